import type { Identity } from '../candidate';

/** First words of rows that are no samples: summaries, targets, limits and the laboratory's own checks. */
const NOT_A_SAMPLE =
  /^((field |farm |site |sample |column |overall |grand |sub|lab(oratory)? |regional |county )?(averages?|avg|means?|medians?|min(imum)?s?|max(imum)?s?|totals?|sum|st\.? ?dev(iation)?\.?|std\.? ?dev(iation)?\.?|std|sd|cv|cv ?%|rsd|count|n|range)|optimum|optimal|opt\.?|desired|targets?|ideal|previous|last (year|test)|(method |reagent |lab )?blank|(lab )?control sample|lcs|qc.*|check (sample|soil|standard)|reference (soil|material|sample)|standard reference.*|(method )?(reporting|detection|quantitation|report|det\.?) (limits?|lvl)|limits? of (reporting|detection|quantification|quantitation|determination)|mdl|rl|mrl|lor|eql|lod|loq|pql|normal|sufficien\w*|guide\w*|units?|unit of measure|methods?|extractant|test method|procedure|ratings?|interpretation|recommend\w*|critical( level| value)?|deficit|change( (from|since|to) .{1,20})?|difference|shortage|surplus|needed|wanted|threshold|benchmark|goal|duplicate rpd|rpd|% recovery|spike.*)( (level|levels|value|values|range|row|of .{1,30}|for .{1,30}|\(.*\)))?:?$/i;

/** True when a row's name says it is no sample; a row with a laboratory number of its own is one all the same. */
export function isNoSample(name: string, identity: Identity): boolean {
  if (!NOT_A_SAMPLE.test(name.trim())) return false;
  const own = identity.labNumber !== undefined && !NOT_A_SAMPLE.test(identity.labNumber);
  const quality = /blank|control|lcs|qc|check|reference|spike|duplicate/i.test(name);
  return quality || !own;
}

function near(a: number, b: number): boolean {
  return Math.abs(a - b) <= 0.006 * Math.max(1, Math.abs(b)) + 0.051;
}

/** A nameless last row whose numbers are sums, means, lowest or highest of those above is a summary. */
export function isSummary(row: readonly (number | null)[], above: readonly (readonly (number | null)[])[]): boolean {
  if (above.length < 2) return false;
  const kinds = [
    (list: number[]) => list.reduce((sum, one) => sum + one, 0) / list.length,
    (list: number[]) => list.reduce((sum, one) => sum + one, 0),
    (list: number[]) => Math.min(...list),
    (list: number[]) => Math.max(...list),
  ];
  const columns = row.flatMap((value, column) => {
    const list = above.flatMap((other) => other[column] ?? []);
    return value === null || list.length < 2 ? [] : [{ value, list }];
  });
  return columns.length >= 2 && kinds.some((kind) => columns.every(({ value, list }) => near(value, kind(list))));
}
