import { describe, expect, it } from 'vitest';
import { megabytes, pauseBefore, readingText, refusedBeforeSending, sentText } from './upload-item';

describe('refusedBeforeSending', () => {
  const named = (name: string, size: number) => refusedBeforeSending({ name, size });
  it('lets through what the server may take, to the last byte', () => {
    expect(named('spring.PDF', 20 * 1024 * 1024)).toBeNull();
    expect(named('old years.csv', 1)).toBeNull();
  });
  it('refuses an empty file, one byte too many and other kinds, each with what to do', () => {
    expect(named('spring.pdf', 0)).toContain('empty');
    expect(named('spring.pdf', 20 * 1024 * 1024 + 1)).toContain('20 MB');
    expect(named('letter.docx', 10)).toContain('PDF');
    expect(named('no ending', 10)).toContain('type it in');
  });
});

describe('words', () => {
  it('say sizes with their unit once', () => {
    expect(megabytes(0)).toBe('0 KB');
    expect(megabytes(3_000)).toBe('3 KB');
    expect(megabytes(3.4 * 1024 * 1024)).toBe('3.4 MB');
    expect(sentText(1.2 * 1024 * 1024, 3.4 * 1024 * 1024)).toBe('1.2 of 3.4 MB');
    expect(sentText(2_000, 3.4 * 1024 * 1024)).toBe('2 KB of 3.4 MB');
  });
  it('say which page is read', () => {
    expect(readingText(null)).toBe('waiting to be read');
    expect(readingText({ state: 'reading', pages: 3, pagesRead: 1 })).toBe('reading page 2 of 3');
    expect(readingText({ state: 'reading', pages: null, pagesRead: 0 })).toBe('reading');
  });
  it('wait longer before the third try than before the second', () => {
    expect(pauseBefore(2)).toBe(800);
    expect(pauseBefore(3)).toBe(2_400);
  });
});
