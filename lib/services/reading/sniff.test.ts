import { describe, expect, it } from 'vitest';
import { sniffReport } from './sniff';

const bytes = (text: string) => new TextEncoder().encode(text);
const hex = (text: string) => Uint8Array.from(Buffer.from(text, 'hex'));

describe('sniffReport', () => {
  it.each([
    ['a.pdf', bytes('%PDF-1.4\n'), 'pdf', true],
    ['A.PDF', bytes('\n\n%PDF-1.4\n'), 'pdf', true],
    ['a.csv', bytes('pH,P\n6.5,20\n'), 'csv', true],
    ['a.tsv', hex('fffe70004800'), 'csv', true],
    ['a.jpg', hex('ffd8ffe000104a464946'), 'jpeg', true],
    ['a.png', hex('89504e470d0a1a0a'), 'png', true],
    ['a.xls', hex('d0cf11e0a1b11ae1'), 'xls', true],
    ['a.txt', bytes('pH: 6.5\n'), 'text', true],
    ['a.xml', bytes('<?xml version="1.0"?><Event/>'), 'xml', true],
    ['a.xml', bytes('\ufeff<Event/>'), 'xml', true],
    ['a.json', bytes(' {"id": 1}'), 'json', true],
    ['a.xlsx', Uint8Array.from([...hex('504b0304'), ...bytes('[Content_Types].xml')]), 'xlsx', true],
    [
      'a.xlsx',
      Uint8Array.from([...hex('d0cf11e0a1b11ae1'), ...Buffer.from('EncryptedPackage', 'utf16le')]),
      'xlsx',
      true,
    ],
  ])('%s', (fileName, content, kind, readable) => {
    expect(sniffReport({ bytes: content, fileName })).toMatchObject({ ok: true, kind, readable });
  });
  it.each([
    ['a.pdf', bytes('<html></html>'), 'not-a-pdf'],
    ['a.csv', bytes('%PDF-1.4'), 'not-what-it-says'],
    ['a.csv', bytes('  <!DOCTYPE html>'), 'not-what-it-says'],
    ['a.png', hex('ffd8ffe0'), 'not-what-it-says'],
    ['a.xlsx', hex('504b0304aaaa'), 'not-what-it-says'],
    ['a.csv', hex('0102030405060708'), 'not-what-it-says'],
    ['a.xml', bytes('<?xml version="1.0"?><svg/>'), 'not-what-it-says'],
    ['a.json', bytes('pH,P'), 'not-what-it-says'],
    ['a.csv', bytes('{"id": 1}'), 'not-what-it-says'],
    ['a.txt', bytes('<?xml version="1.0"?><a/>'), 'not-what-it-says'],
    ['a.xlsx', hex('d0cf11e0a1b11ae1'), 'not-what-it-says'],
    ['a.svg', bytes('<svg/>'), 'type-not-accepted'],
    ['a', bytes('pH,P'), 'type-not-accepted'],
    ['a.pdf', new Uint8Array(), 'empty'],
  ])('%s is refused', (fileName, content, code) => {
    expect(sniffReport({ bytes: content, fileName })).toMatchObject({ ok: false, code });
  });

  const zip = (name: string) => Uint8Array.from([...hex('504b0304'), ...bytes(name)]);
  const CONTENTS: Readonly<Record<string, Uint8Array>> = {
    pdf: bytes('%PDF-1.7\n'),
    jpg: hex('ffd8ffe000104a464946'),
    png: hex('89504e470d0a1a0a'),
    xlsx: zip('[Content_Types].xml'),
    xls: hex('d0cf11e0a1b11ae1'),
    xml: bytes('<?xml version="1.0"?><Event/>'),
    json: bytes('{"id": 1}'),
    csv: bytes('pH,P\n6.5,20\n'),
    txt: bytes('pH: 6.5\n'),
    'web page': bytes('<!doctype html><p>6.5</p>'),
    drawing: bytes('<?xml version="1.0"?><svg/>'),
    letter: zip('word/document.xml'),
    program: hex('7f454c4602010100'),
    'other picture': bytes('GIF89a\u0000\u0000\u0000\u0000'),
  };
  const ENDINGS = ['pdf', 'jpg', 'png', 'xlsx', 'xls', 'xml', 'json', 'csv', 'txt'];
  const alike = (content: string, ending: string) =>
    content === ending || (['csv', 'txt'].includes(content) && ['csv', 'txt'].includes(ending));
  const pairs = Object.keys(CONTENTS).flatMap((content) => ENDINGS.map((ending) => ({ content, ending })));
  it.each(pairs)('$content named .$ending', ({ content, ending }) => {
    const sniffed = sniffReport({ bytes: CONTENTS[content] ?? new Uint8Array(), fileName: `a.${ending}` });
    if (alike(content, ending)) expect(sniffed).toMatchObject({ ok: true });
    else expect(sniffed).toMatchObject({ ok: false, code: ending === 'pdf' ? 'not-a-pdf' : 'not-what-it-says' });
  });

  it('takes a short text with a few control characters for text', () => {
    expect(sniffReport({ bytes: bytes('Bed\u0007,pH\u001b\n1,6.5\n'), fileName: 'a.csv' })).toMatchObject({ ok: true });
  });
});
