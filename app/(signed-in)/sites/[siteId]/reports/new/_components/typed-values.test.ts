import { describe, expect, it } from 'vitest';
import { formField, OTHER_LABORATORY, readTyped } from './typed-values';

describe('readTyped', () => {
  it('takes an empty form as one sample of which nothing is known yet', () => {
    expect(readTyped({}, [1], 'in')).toEqual({
      ok: true,
      body: {
        laboratoryId: null,
        laboratoryName: null,
        samples: [{ name: null, labNumber: null, plotId: null, takenOn: null, depthFromCm: null, depthToCm: null }],
      },
    });
  });

  // 1 in = 2.54 cm exactly (International Yard and Pound Agreement, 1959).
  it('reads depths in the person’s unit, from the surface when no upper end is given', () => {
    const read = readTyped({ 'to-4': '6', 'day-4': '2026-04-10' }, [4], 'in');
    expect(read.ok && read.body.samples[0]).toMatchObject({ depthFromCm: 0, depthToCm: 15.24, takenOn: '2026-04-10' });
  });

  it('refuses a slice that is upside down, half given, or no number, at its field', () => {
    expect(readTyped({ 'from-1': '6', 'to-1': '2' }, [1], 'cm')).toMatchObject({
      ok: false,
      errors: { 'to-1': expect.any(String) },
    });
    expect(readTyped({ 'from-1': '6' }, [1], 'cm')).toMatchObject({
      ok: false,
      errors: { 'to-1': expect.any(String) },
    });
    expect(readTyped({ 'to-1': 'deep' }, [1], 'cm')).toMatchObject({
      ok: false,
      errors: { 'to-1': expect.any(String) },
    });
  });

  it('takes a listed laboratory or a new name, never both', () => {
    expect(readTyped({ laboratory: 'lab-1', laboratoryName: 'left over' }, [1], 'cm')).toMatchObject({
      body: { laboratoryId: 'lab-1', laboratoryName: null },
    });
    expect(readTyped({ laboratory: OTHER_LABORATORY, laboratoryName: 'Elm Hill' }, [1], 'cm')).toMatchObject({
      body: { laboratoryId: null, laboratoryName: 'Elm Hill' },
    });
    expect(readTyped({ laboratory: OTHER_LABORATORY }, [1], 'cm')).toMatchObject({ ok: false });
  });
});

describe('formField', () => {
  it('finds the field of a row that is no longer the one it was', () => {
    expect(formField('samples.1.takenOn', [1, 5])).toBe('day-5');
    expect(formField('laboratoryName', [1])).toBe('laboratoryName');
  });
});
