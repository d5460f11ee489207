import { describe, expect, it } from 'vitest';
import { meaningOfCode, ucumUnit } from './codes';
import { jsonTree } from './json';
import { childOf, textAt } from './node';
import { readLabData } from './readLabData';

function slim(result: object, more: object = {}) {
  const text = JSON.stringify({
    _type: 'application/vnd.modus.slim.v1.0+json',
    id: '1',
    date: '2025-05-11',
    type: 'soil',
    samples: { a: { source: { sampleid: 'North' }, results: { 1: result } } },
    ...more,
  });
  const tree = jsonTree(text);
  if (!tree.ok) throw new Error(tree.reason);
  return readLabData({ fileName: 'a.json', root: tree.root });
}

describe('JSON with places', () => {
  it('gives every value its line and character', () => {
    const tree = jsonTree('{\n  "a": [ { "v": 6.4 }, { "v": "<0.1" } ],\n  "b": null\n}');
    if (!tree.ok) throw new Error(tree.reason);
    expect(childOf(tree.root, 'a', 'v')).toMatchObject({ text: '6.4', line: 2, column: 17 });
    expect(tree.root.children.map((child) => child.name)).toEqual(['a', 'a', 'b']);
    expect(textAt(tree.root, 'b')).toBeNull();
  });
  it('reads what the language itself reads, escapes included', () => {
    const tree = jsonTree('{"a":"\\u00e4\\n\\"x"}');
    expect(tree.ok ? textAt(tree.root, 'a') : '').toBe('ä\n"x');
  });
  it.each(['', '{', '{"a":1,}', '[1 2]', '{"a":"\n"}', '{"a":01}', '{} {}', "{'a':1}"])('%j is broken', (text) => {
    expect(jsonTree(text)).toEqual({ ok: false, reason: 'broken-json' });
  });
  it('refuses deep nesting without falling into it', () => {
    expect(jsonTree('['.repeat(100_000))).toEqual({ ok: false, reason: 'nested-too-deep' });
  });
});

describe('codes and units of the standard', () => {
  it('gives analyte and method, never a unit', () => {
    expect(meaningOfCode('S-P-BIC.01.03')).toEqual({ analyte: 'phosphorus', method: 'Olsen' });
    expect(meaningOfCode('L_MODV2_SOIL_P_045')).toEqual({ analyte: 'phosphorus', method: 'Olsen' });
    expect(meaningOfCode('L_MODV2_SOIL_P_999')).toBeNull();
  });
  it('knows the units that the code of units writes', () => {
    expect(ucumUnit('[lb_av]/[acr_us]')).toBe('lb/acre');
    expect(ucumUnit('meq/(100.g)')).toBe('meq/100g');
    expect(ucumUnit('furlong')).toBeNull();
  });
});

describe('reading laboratory data', () => {
  it('takes the unit from the file even where the code stands for another', () => {
    const [sample] = slim({ analyte: 'K', value: 212, units: '[lb_av]/[acr_us]', modusTestID: 'S-K-M3.05' }).samples;
    expect(sample?.results[0]).toMatchObject({ analyte: 'potassium', value: 212, unit: 'lb/acre', method: 'M3' });
  });
  it('keeps a sign that stands in the value', () => {
    expect(slim({ analyte: 'B', value: '<0.02', units: 'mg/kg' }).samples[0]?.results[0]).toMatchObject({
      value: 0.02,
      qualifier: '<',
      printed: '<0.02',
    });
  });
  it('gives no unit where the file gives none', () => {
    const result = slim({ analyte: 'P', value: 22 }).samples[0]?.results[0];
    expect(result).toMatchObject({ unit: null });
    expect(result?.doubts.map((doubt) => doubt.code)).toContain('unit-missing');
  });
  it('takes a share by its unit and by its code', () => {
    expect(slim({ analyte: 'Ca', value: 66, units: '%' }).samples[0]?.results[0]?.analyte).toBe('sat_ca');
    expect(
      slim({ analyte: 'Ca', value: 66, units: '%', modusTestID: 'S-BS-CA.19' }).samples[0]?.results[0]?.analyte,
    ).toBe('sat_ca');
  });
  it('takes nothing of water, and says what it is', () => {
    const reading = slim({ analyte: 'Ca', value: 66, units: 'mg/L' }, { type: 'water' });
    expect(reading).toMatchObject({ kind: 'not-soil', samples: [] });
    expect(reading.warnings[0]?.sentence).toContain('a water test');
  });
  it('refuses JSON of another kind', () => {
    const tree = jsonTree('{"orders":[1]}');
    expect(tree.ok ? readLabData({ fileName: 'a.json', root: tree.root }).error?.code : '').toBe('not-lab-data');
  });
});
