import { describe, expect, it } from 'vitest';
import { typedLines } from '@/tests/support/typedPage';
import { paragraphsOf, proseRows } from './prose';

function told(text: string) {
  const { rows, refused } = proseRows(paragraphsOf(typedLines(text), new Set()), { decimalComma: false });
  return {
    taken: rows.map(({ candidate: one }) => [one.label.analyte, one.value.qualifier, one.value.printed, one.unit]),
    ratings: rows.map(({ candidate }) => candidate.rating),
    doubts: rows.flatMap(({ candidate }) => candidate.doubts.map((doubt) => doubt.code)),
    why: refused.map((one) => one.why),
  };
}

describe('proseRows takes', () => {
  it('what a sentence says of this sample, with its rating and a doubt', () => {
    const found = told('Your soil pH is 6.3 and phosphorus tested at 45 ppm (high).');
    expect(found.taken).toEqual([
      ['soil_ph_water', '=', '6.3', null],
      ['phosphorus', '=', '45', 'mg/kg'],
    ]);
    expect(found.ratings).toEqual([null, 'high']);
    expect(found.doubts).toEqual(['from-a-sentence', 'from-a-sentence']);
  });
  it('a number that stands before its name', () => {
    expect(told('The sample held 45 ppm phosphorus and 210 ppm of potassium.').taken).toEqual([
      ['phosphorus', '=', '45', 'mg/kg'],
      ['potassium', '=', '210', 'mg/kg'],
    ]);
  });
  it('one amount in two units', () => {
    expect(told('Phosphorus in this bed was 45 ppm (90 lb/acre) this time.').taken).toEqual([
      ['phosphorus', '=', '45', 'mg/kg'],
      ['phosphorus', '=', '90', 'lb/acre'],
    ]);
  });
  it('less than and more than', () => {
    expect(told('Boron was less than 0.2 ppm and zinc was over 30 ppm here.').taken).toEqual([
      ['boron', '<', '0.2', 'mg/kg'],
      ['zinc', '>', '30', 'mg/kg'],
    ]);
  });
  it('a name that goes on in the next line', () => {
    expect(told('In the long bed by the wall we found that phos-\nphorus is 45 ppm by our method.').taken).toEqual([
      ['phosphorus', '=', '45', 'mg/kg'],
    ]);
  });
  it('the first of two numbers that nothing joins', () => {
    expect(told('Phosphorus in this bed was 45 ppm, and 90 lb/acre went on it.').taken).toEqual([
      ['phosphorus', '=', '45', 'mg/kg'],
    ]);
  });
});

describe('proseRows refuses', () => {
  it.each([
    ['a wanted value', 'In this bed the soil pH should be near 6.5 by spring.'],
    ['a wanted value', 'In this bed potassium needs to reach 180 ppm by spring.'],
    ['an earlier value', 'Last year the phosphorus was 30 ppm in this bed.'],
    ['an earlier value', 'In this bed phosphorus is up from 30 ppm.'],
    ['an earlier value', 'The potassium was 150 ppm in 2021 or so.'.replace('The', 'In 2021 the')],
    ['an amount to spread', 'Apply phosphorus at 0.5 per 100 square feet.'],
    ['unit of an amount to spread', 'The potassium comes to 20 g/m2 for this bed.'],
    ['a sentence about soils in general', 'Crops do well if soil pH is 6.5 or so.'],
    ['a second number for the same name', 'The soil pH is 6.3 here, and soil pH is 6.9 there.'],
  ])('%s: "%s"', (why, sentence) => expect(told(sentence).why).toContain(why));

  it('takes nothing from what it refuses, and goes on with the next sentence', () => {
    const found = told('The soil pH should be 6.5 in this bed. The soil pH is 6.1 today.');
    expect(found.taken).toEqual([['soil_ph_water', '=', '6.1', null]]);
    expect(found.why).toEqual(['a wanted value']);
  });
  it.each([
    ['ranges', 'The soil pH of this bed lies at 6.0 to 6.8 on a good day.'],
    ['counts', 'The potassium was spread at 3 pounds a bed.'],
    ['days', 'The potassium was measured on March 4 in this bed.'],
    ['symbols without a number beside them', 'Samples of class K in the shed number 14 or 15.'],
  ])('%s without a word', (_, sentence) => expect(told(sentence).taken).toEqual([]));
});

describe('paragraphsOf', () => {
  it('leaves quoted letters and lines already taken out', () => {
    const lines = typedLines(`
The soil pH of this bed is 6.4 today.

> The soil pH of this bed was 5.9 then.`);
    const words = (taken: ReadonlySet<(typeof lines)[number]>) =>
      paragraphsOf(lines, taken).map((one) => one.words.map(({ word }) => word.text).join(' '));
    expect(words(new Set())).toEqual(['The soil pH of this bed is 6.4 today.']);
    expect(words(new Set(lines))).toEqual([]);
  });
});
