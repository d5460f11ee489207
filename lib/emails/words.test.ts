import { describe, expect, it } from 'vitest';
import { greeting, oneLine, plainLetter, subjectLine, UnsafeSubjectError, webAddress } from './words';

describe('subjectLine', () => {
  it('joins its parts', () => {
    expect(subjectLine('Sample ', 'North bed', ', due 20 May 2026')).toBe('Sample North bed, due 20 May 2026');
  });

  it.each(['\r\n', '\n', '\r', '\u2028', '\u2029', '\u0085'])('refuses a line break (%j) in any part', (breaker) => {
    expect(() => subjectLine('Sample ', `a${breaker}Bcc: x@example.org`)).toThrow(UnsafeSubjectError);
  });

  it('turns tabs into spaces and drops marks that turn the writing around', () => {
    expect(subjectLine('North\tbed \u202Efdp.exe')).toBe('North bed fdp.exe');
  });

  it('ends a very long subject in an ellipsis without cutting a letter in half', () => {
    const subject = subjectLine('𝒳'.repeat(400));
    expect(Array.from(subject)).toHaveLength(180);
    expect(subject.endsWith('𝒳…')).toBe(true);
  });
});

describe('greeting', () => {
  it('uses the name', () => expect(greeting(' Wren ')).toBe('Hello Wren,'));
  it('stands without one', () => expect(greeting('')).toBe('Hello,'));
  it.each(['http://win.example/now', 'www.win.example', 'see win.example/now', 'a@win.example'])(
    'does not repeat a name that reads like an address: %s',
    (name) => expect(greeting(name)).toBe('Hello,'),
  );
});

describe('oneLine', () => {
  it('keeps a user value on one line and bounded', () => {
    expect(oneLine('a\r\nb\u0000c')).toBe('a b c');
    expect(Array.from(oneLine('x'.repeat(300)))).toHaveLength(80);
  });
});

describe('webAddress', () => {
  it('lets web addresses through', () =>
    expect(webAddress('https://loamline.example/a?b=1')).toBe('https://loamline.example/a?b=1'));
  it.each(['javascript:alert(1)', '/relative', 'data:text/html,x'])('refuses %s', (url) =>
    expect(() => webAddress(url)).toThrow(),
  );
});

describe('plainLetter', () => {
  it('parts paragraphs by one blank line and leaves empty ones out', () => {
    expect(plainLetter(['a', null, '', 'b'])).toBe('a\n\nb\n');
  });
});
