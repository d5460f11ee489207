import { describe, expect, it } from 'vitest';
import { pastedFault, pastedFile } from './pasted-file';

describe('a pasted text', () => {
  it('is kept to the letter as a text file named by the day', async () => {
    const text = 'pH  6,4\r\nBor <0,1 mg/kg — Prüfbericht\n';
    const file = pastedFile(text, '2026-12-01');
    expect([file.name, file.type]).toEqual(['pasted 2026-12-01.txt', 'text/plain']);
    expect(new TextDecoder().decode(await file.arrayBuffer())).toBe(text);
  });
  it('needs a number and is no book', () => {
    expect(pastedFault('pH 6.4')).toBeNull();
    expect(pastedFault(' \n ')).toContain('first');
    expect(pastedFault('Dear grower')).toContain('no number');
    expect(pastedFault('1'.repeat(600_000))).toContain('longer');
  });
});
