import { describe, expect, it } from 'vitest';
import { typedLines } from '@/tests/support/typedPage';
import { notSoil, SOIL_WORDS } from './matter';

const about = (text: string) => notSoil(typedLines(text));

describe('notSoil', () => {
  it('knows a water test', () => {
    const page = `
Irrigation water analysis
Source: north well
pH             7.4
Alkalinity     180 mg/L
Hardness       210 mg/L
SAR            2.1`;
    expect(about(page)).toBe('a water test');
  });
  it('knows a leaf test under the name of a soil laboratory', () => {
    const page = `
Marsh Lane Soil Test Laboratory
Leaf analysis
Growth stage: first flower
Nitrogen       3.2 %  of dry matter
Potassium      2.1 %`;
    expect(about(page)).toBe('a plant tissue test');
  });
  it('knows a manure test', () => {
    const page = `
Manure analysis report
Nitrogen       12 lb/ton   as received
Phosphate      5 lb/ton
Dry matter     31 %`;
    expect(about(page)).toBe('a compost or manure test');
  });
  it.each([
    ['a plot called after compost', 'Soil test report\nPlot: Compost corner\npH       6.4\nCEC      12'],
    ['a remark about water', 'Soil analysis\npH       6.4\nMehlich P     38\nCheck your irrigation water as well.'],
    ['a page that says nothing of itself', 'pH       6.4\nZinc     2.1'],
    ['an empty page', ''],
  ])('leaves %s to the reader of soil', (_, page) => expect(about(page)).toBeNull());
});

describe('SOIL_WORDS', () => {
  it('finds the title of a report and not the name of a laboratory', () => {
    expect(['Soil Test Report', 'soil analysis', 'Soil samples'].filter((text) => !SOIL_WORDS.test(text))).toEqual([]);
    expect(['Soil Testing Service', 'Soil Test Laboratory', 'topsoil'].filter((text) => SOIL_WORDS.test(text))).toEqual(
      [],
    );
  });
});
