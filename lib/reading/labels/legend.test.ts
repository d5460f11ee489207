import { describe, expect, it } from 'vitest';
import { legendOf, spelledOut } from './legend';

describe('legendOf', () => {
  it('takes the abbreviations that a page explains with the name of an analyte', () => {
    const legend = legendOf(['Key: ZX = humic matter; Qa = exchangeable acidity', 'XB stands for base saturation.']);
    expect([...legend]).toEqual([
      ['ZX', 'humic matter'],
      ['Qa', 'exchangeable acidity'],
      ['XB', 'base saturation'],
    ]);
  });
  it('leaves known symbols, words that are no analyte and later explanations aside', () => {
    expect([...legendOf(['Mg = soil moisture, NS = not sampled, VH = very high indeed'])]).toEqual([]);
    expect([...legendOf(['ZX = humic matter', 'ZX = zinc'])]).toEqual([['ZX', 'humic matter']]);
  });
  it('cuts off what goes on after the name', () => {
    expect([...legendOf(['ZX = humic matter counted twice'])]).toEqual([['ZX', 'humic matter']]);
  });
});

describe('spelledOut', () => {
  const legend = new Map([['ZX', 'humic matter']]);
  it.each([
    ['ZX', 'humic matter'],
    ['ZX%', 'humic matter %'],
    ['ZX (g/100cc)', 'humic matter (g/100cc)'],
    ['ZXS', 'ZXS'],
    ['The ZX', 'The ZX'],
    ['zx', 'zx'],
  ])('"%s" is "%s"', (text, words) => expect(spelledOut(text, legend)).toBe(words));
});
