import { describe, expect, it } from 'vitest';
import { decodeText, guessDelimiter } from './delimiter';

describe('guessDelimiter', () => {
  it.each([
    ['a,b,c\n1,2,3', ','],
    ['a;b;c\n1,5;2,0;3,1', ';'],
    ['a\tb\n1\t2', '\t'],
    ['"x,y";b\n"1,2,3";4', ';'],
    ['one column', ','],
    ['', ','],
  ])('%j', (text, delimiter) => {
    expect(guessDelimiter(text)).toBe(delimiter);
  });
});

describe('decodeText', () => {
  it('reads UTF-8, UTF-16 with its mark, and the old Windows set', () => {
    expect(decodeText(new TextEncoder().encode('m²'))).toBe('m²');
    expect(decodeText(Uint8Array.from([0xff, 0xfe, 0x70, 0x00, 0x48, 0x00]))).toBe('pH');
    expect(decodeText(Uint8Array.from([0xfe, 0xff, 0x00, 0x70, 0x00, 0x48]))).toBe('pH');
    expect(decodeText(Uint8Array.from([0x6d, 0xb2]))).toBe('m²');
  });
});
