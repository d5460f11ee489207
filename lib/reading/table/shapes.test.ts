import { describe, expect, it } from 'vitest';
import { readTable } from '../readTable';

function taken(...lines: string[]): string[] {
  const { samples } = readTable({ fileName: 'a.csv', text: lines.join('\n') });
  return samples.flatMap((sample) =>
    sample.results.map((result) =>
      [sample.sampleId, result.analyte, result.printed, result.unit ?? '?', result.rating ?? ''].join(' ').trim(),
    ),
  );
}

const advice = (...lines: string[]) =>
  readTable({ fileName: 'a.csv', text: lines.join('\n') }).recommendations.map(
    ({ sampleId, item, amount, unit }) => `${sampleId}: ${item} ${amount} ${unit}`,
  );

describe('what stands beside a result in a data file', () => {
  it('classes under the analyte rate its number', () => {
    expect(taken('ID,pH,P,,K,', ',,mg/l,Index,mg/l,Index', 'Home,6.4,22,2,168,2-')).toEqual([
      'Home soil_ph_water 6.4 pH',
      'Home phosphorus 22 mg/L 2',
      'Home potassium 168 mg/L 2-',
    ]);
  });
  it('found and desired rows of one sample', () => {
    expect(taken('Sample,Row,pH,P ppm', 'A,Found,6.2,22', 'A,Desired,6.5,40')).toEqual([
      'A soil_ph_water 6.2 pH',
      'A phosphorus 22 mg/kg',
    ]);
  });
  it('changes and older years under the samples', () => {
    expect(taken('Plot,pH,P ppm', 'One,6.5,45', 'Change from 2023,+0.1,+3', '2023,6.4,42')).toEqual([
      'One soil_ph_water 6.5 pH',
      'One phosphorus 45 mg/kg',
    ]);
  });
  it('the newest of several days across', () => {
    expect(taken('sample,test,2022-10,2024-10', 'North,pH,6.2,6.4', 'North,P ppm,20,24')).toEqual([
      'North soil_ph_water 6.4 pH',
      'North phosphorus 24 mg/kg',
    ]);
  });
  it('wanted levels under the same names as the results', () => {
    const lines = ['Sample,Result,Result,Target,Target', ',pH,P (ppm),pH,P (ppm)', 'A,6.4,22,6.5,40'];
    expect(taken(...lines)).toEqual(['A soil_ph_water 6.4 pH', 'A phosphorus 22 mg/kg']);
  });
  it('low and high ends of what is wanted', () => {
    expect(taken('Lab#,Sample,pH,P ppm,P Opt Low,P Opt High', '1,Lawn,5.9,22,30,50')).toEqual([
      'Lawn soil_ph_water 5.9 pH',
      'Lawn phosphorus 22 mg/kg',
    ]);
  });
});

describe('how samples stand in a data file', () => {
  it('across, each over its result and rating', () => {
    expect(taken(',North,,South,', ',Result,Rating,Result,Rating', 'pH,6.2,L,6.6,M', 'P (ppm),22,M,31,M')).toEqual([
      'North soil_ph_water 6.2 pH L',
      'North phosphorus 22 mg/kg M',
      'South soil_ph_water 6.6 pH M',
      'South phosphorus 31 mg/kg M',
    ]);
  });
  it('with a name said once for the rows under it', () => {
    expect(taken('Sample,Test,Result,Unit', 'North,pH,6.5,', ',P,33,ppm', 'South,pH,6.7,', ',P,30,ppm')).toEqual([
      'North soil_ph_water 6.5 pH',
      'North phosphorus 33 mg/kg',
      'South soil_ph_water 6.7 pH',
      'South phosphorus 30 mg/kg',
    ]);
  });
  it('on two pages with the headings said again', () => {
    const head = 'Sample,pH,P mg/kg';
    expect(taken('Page 1', head, 'Plum,6.4,22', 'Page 2', head, 'Fig,6.1,19', 'Average,6.25,20.5')).toEqual([
      'Plum soil_ph_water 6.4 pH',
      'Plum phosphorus 22 mg/kg',
      'Fig soil_ph_water 6.1 pH',
      'Fig phosphorus 19 mg/kg',
    ]);
  });
  it('with the unit of all said in a line over them', () => {
    expect(
      taken('All results are on a dry weight basis in mg/kg unless shown otherwise.', 'Sample,pH,P', 'A,6.4,22'),
    ).toEqual(['A soil_ph_water 6.4 pH', 'A phosphorus 22 mg/kg']);
  });
});

describe('advice in a data file', () => {
  it('in columns of its own, with oxides by area beside the element', () => {
    const lines = ['Sample,P mg/kg,K mg/kg,Lime t/ha,P2O5 kg/ha,K2O kg/ha', 'A,22,140,3,50,60'];
    expect(taken(...lines)).toEqual(['A phosphorus 22 mg/kg', 'A potassium 140 mg/kg']);
    expect(advice(...lines)).toEqual(['A: Lime 3 t/ha', 'A: P2O5 50 kg/ha', 'A: K2O 60 kg/ha']);
  });
  it('on the rows of a list', () => {
    const lines = [
      'Sample,Test,Result,Unit,Lime Rec',
      'A,pH,6.2,,1 T/A',
      'A,Phosphorus,22,ppm,',
      'A,Lime,40,lb/1000 sq ft,',
    ];
    expect(taken(...lines)).toEqual(['A soil_ph_water 6.2 pH', 'A phosphorus 22 mg/kg']);
    expect(advice(...lines)).toEqual(['A: Lime 1 ton/acre', 'A: Lime 40 lb/1000ft2']);
  });
});
