import { describe, expect, it } from 'vitest';
import { describedName, onlyDescribes } from './described';

const NAMES: Readonly<Record<string, string>> = { phosphorus: 'P', potassium: 'K', magnesium: 'Mg', calcium: 'Ca' };
const find = (plain: string) => NAMES[plain] ?? null;

describe('onlyDescribes', () => {
  it.each(['Mehlich 3 extractable', '0.01 M CaCl2', 'extracted with ammonium acetate'])('"%s" names nothing', (text) =>
    expect(onlyDescribes(text)).toBe(true),
  );
  it.each(['', 'phosphorus', 'extractable phosphorus', 'wanted'])('"%s" says more', (text) =>
    expect(onlyDescribes(text)).toBe(false),
  );
});

describe('describedName', () => {
  it.each([
    ['Phosphorus extractable with bicarbonate (Olsen)', 'P'],
    ['Available phosphorus, Bray 1', 'P'],
    ['Potassium (K) exchangeable', 'K'],
    ['Magnesium in potassium chloride extract', 'Mg'],
  ])('"%s" is %s', (text, name) => expect(describedName(text, find)).toBe(name));

  it.each([
    ['a name alone, which needs no describing', 'Phosphorus'],
    ['a word that changes the meaning', 'Phosphorus removed by crops'],
    ['the symbol of another element', 'Phosphorus (K) exchangeable'],
    ['a second name', 'Available calcium magnesium'],
    ['a sentence', `Phosphorus ${'extractable '.repeat(14)}`],
    ['no name', 'Extractable with bicarbonate'],
  ])('has no answer for %s', (_, text) => expect(describedName(text, find)).toBeNull());
});
