import { assemble } from '../assemble';
import { type Candidate, type Identity, remark, type SamplePart } from '../candidate';
import { type Label, unitOnly } from '../labels/label';
import { NO_RESULTS } from '../readPages';
import { ANY_DATE } from '../stages/dates';
import { ratingIn } from '../stages/values';
import { readTableCell } from '../table/cell';
import { labelOf, spoken } from '../table/spoken';
import { type Reading, type Remark, refusedReading } from '../types';
import { meaningOfCode, ucumUnit } from './codes';
import { childOf, childrenOf, type DataNode, listOf, textAt } from './node';

const NOT_LAB_DATA = remark(
  'not-lab-data',
  'This file is not in the open laboratory format that Loamline reads. It is kept; ask the laboratory for PDF or CSV, or type the numbers in.',
);

type Found = {
  readonly parts: SamplePart[];
  readonly dates: string[];
  readonly others: string[];
  readonly warnings: Remark[];
  lab: string | null;
};
type Measured = {
  element: string | null;
  value: DataNode | undefined;
  unit: string | null;
  code: string | null;
  type?: string | null;
  rating?: string | null;
};

/** The analyte by the element's name; where that says nothing, by the test's code, which also gives the method. */
function labelFor(element: string | null, code: string | null): Label | null {
  const coded = code === null ? null : meaningOfCode(code);
  const named = element === null ? null : labelOf(element);
  if (coded === null) return named;
  if (named !== null && named.analyte === coded.analyte)
    return { ...named, method: named.method ?? coded.method, methodPrinted: named.methodPrinted ?? code };
  const base = labelOf('Phosphorus');
  if (base === null) return named;
  const elemental = coded.analyte.startsWith('sat_') || /ph|matter|cec/.test(coded.analyte) ? null : 'element';
  return {
    ...base,
    analyte: coded.analyte,
    text: element ?? code ?? '',
    form: elemental,
    method: coded.method,
    methodPrinted: code,
    strength: 0.98,
    ambiguous: null,
  };
}

function candidateOf(measured: Measured): Candidate | null {
  const { value, unit } = measured;
  if (value === undefined || value.text.trim() === '') return null;
  const label = labelFor(measured.element, measured.code);
  const meaning = readTableCell(value.text.trim(), { decimalComma: false });
  if (label === null || meaning.kind !== 'value') return null;
  if (label.analyte === 'lime_requirement' && !/req|index/i.test(label.text)) return null;
  const known = unit === null ? null : (ucumUnit(unit) ?? unitOnly(spoken(unit))?.unit ?? null);
  const index = measured.type !== null && measured.type !== undefined && /^index$/i.test(measured.type);
  // A share of the exchange capacity is named by its unit where the element says only "K".
  const share = known === '%' ? labelOf(`${spoken(label.text)} %`) : null;
  const isShare = share?.analyte.startsWith('sat_') === true && !label.analyte.startsWith('sat_');
  const settled = share !== null && isShare ? { ...share, text: label.text } : label;
  return {
    label: settled,
    value: meaning,
    rating:
      measured.rating === null || measured.rating === undefined
        ? meaning.rating
        : (ratingIn(measured.rating) ?? measured.rating),
    unit: known ?? (index ? 'index' : settled.unit),
    unitPrinted: unit,
    method: settled.method,
    methodPrinted: settled.methodPrinted,
    page: null,
    box: null,
    cell: { sheet: 1, row: value.line, column: value.column + (value.text.length - value.text.trimStart().length) },
    position: 1,
    doubts: [],
  };
}

function depthWords(top: string | null, bottom: string | null, unit: string | null): Identity {
  if (top === null || bottom === null || unit === null) return {};
  const short = /^(\[in_i\]|in|inch(es)?)$/i.test(unit.trim()) ? 'in' : /^cm|centimet/i.test(unit.trim()) ? 'cm' : null;
  if (short === null) return {};
  return { depth: `${top.replace(/\.0+$/, '')}-${bottom.replace(/\.0+$/, '')} ${short}` };
}

function named(entries: Readonly<Record<string, string | null>>): Identity {
  return Object.fromEntries(
    Object.entries(entries).filter((entry): entry is [string, string] => entry[1] !== null && entry[1] !== ''),
  );
}

function eventType(event: DataNode): string {
  const type = childOf(event, 'EventMetaData', 'EventType');
  return type === undefined ? '' : (type.children[0]?.name ?? type.text);
}

function soilSample(sample: DataNode, event: DataNode, depths: ReadonlyMap<string, Identity>, found: Found) {
  const meta = childOf(sample, 'SampleMetaData');
  const number = textAt(meta, 'SampleNumber');
  const identity = named({
    sampleId: textAt(meta, 'FMISSampleID') ?? textAt(meta, 'SampleContainerID') ?? number,
    labNumber: number,
    fieldName: textAt(event, 'FMISMetaData', 'FMISProfile', 'Field'),
    dateSampled: textAt(event, 'EventMetaData', 'EventDate'),
    dateReported: textAt(event, 'LabMetaData', 'ProcessedDate'),
  });
  for (const depth of listOf(sample, 'Depths', 'Depth')) {
    const id = depth.attributes.DepthID ?? textAt(depth, 'DepthID') ?? '';
    const candidates = listOf(depth, 'NutrientResults', 'NutrientResult').flatMap(
      (result) =>
        candidateOf({
          element: textAt(result, 'Element'),
          value: childOf(result, 'Value'),
          unit: textAt(result, 'ValueUnit'),
          code: textAt(result, 'ModusTestID'),
          type: textAt(result, 'ValueType'),
          rating: textAt(result, 'ValueDesc'),
        }) ?? [],
    );
    if (candidates.length > 0) found.parts.push({ identity: { ...identity, ...depths.get(id) }, candidates });
  }
  const said = textAt(sample, 'Comments') ?? textAt(meta, 'Comments');
  if (said !== null && /[<>]|below|less than|not detected|above|more than/i.test(said))
    found.warnings.push(
      remark(
        'comment-about-values',
        `The laboratory remarks on ${identity.sampleId ?? 'a sample'}: "${said.slice(0, 200)}". The format cannot hold such signs; check these numbers.`,
      ),
    );
}

/** The first version of the standard: events with samples, depths and results, in XML or in JSON of the same names. */
function readEvents(root: DataNode): Found {
  const found: Found = { parts: [], dates: [], others: [], warnings: [], lab: null };
  const events = root.name.toLowerCase() === 'event' ? [root] : listOf(root, 'Events', 'Event');
  for (const event of events) {
    found.lab ??= textAt(event, 'LabMetaData', 'LabName');
    const soil = childOf(event, 'EventSamples', 'Soil');
    const type = eventType(event);
    if (soil === undefined || (type !== '' && !/soil/i.test(type))) {
      found.others.push(type || (childOf(event, 'EventSamples')?.children[0]?.name ?? ''));
      continue;
    }
    const depths = new Map(
      listOf(soil, 'DepthRefs', 'DepthRef').map((ref): [string, Identity] => [
        ref.attributes.DepthID ?? textAt(ref, 'DepthID') ?? '',
        depthWords(textAt(ref, 'StartingDepth'), textAt(ref, 'EndingDepth'), textAt(ref, 'DepthUnit')),
      ]),
    );
    const samples = [...childrenOf(soil, 'SoilSample'), ...listOf(soil, 'SoilSamples', 'SoilSample')];
    for (const sample of new Set(samples)) soilSample(sample, event, depths, found);
  }
  return found;
}

function slimDepth(node: DataNode | undefined): Identity {
  return depthWords(textAt(node, 'top'), textAt(node, 'bottom'), textAt(node, 'units'));
}

/** The slim form: what stands at the top holds for every sample that does not say otherwise. */
function readSlim(root: DataNode): Found {
  const found: Found = { parts: [], dates: [], others: [], warnings: [], lab: textAt(root, 'lab', 'name') };
  const type = textAt(root, 'type') ?? '';
  if (!/^soil$/i.test(type)) {
    found.others.push(type);
    return found;
  }
  const above = named({
    dateSampled: textAt(root, 'date'),
    fieldName: textAt(root, 'source', 'field', 'name') ?? textAt(root, 'source', 'field'),
    dateReported: textAt(root, 'lab', 'dateProcessed'),
  });
  for (const sample of childOf(root, 'samples')?.children ?? []) {
    const own = textAt(sample, 'source', 'sampleid');
    const number = textAt(sample, 'lab', 'sampleid');
    const identity = named({ sampleId: own ?? number ?? sample.name, labNumber: number });
    const depth = { ...slimDepth(childOf(root, 'depth')), ...slimDepth(childOf(sample, 'depth')) };
    const candidates = (childOf(sample, 'results')?.children ?? []).flatMap(
      (result) =>
        candidateOf({
          element: textAt(result, 'analyte'),
          value: childOf(result, 'value'),
          unit: textAt(result, 'units'),
          code: textAt(result, 'modusTestID') ?? textAt(result, 'modusTestIDv2'),
        }) ?? [],
    );
    if (candidates.length > 0) found.parts.push({ identity: { ...above, ...depth, ...identity }, candidates });
  }
  return found;
}

function isSlim(root: DataNode): boolean {
  return (
    /modus\.slim/.test(textAt(root, '_type') ?? '') ||
    (childOf(root, 'samples') !== undefined && textAt(root, 'type') !== null)
  );
}

const MATERIALS: readonly (readonly [RegExp, string])[] = [
  [/plant|tissue/i, 'a plant tissue test'],
  [/water/i, 'a water test'],
  [/nematode/i, 'a nematode count'],
  [/residue/i, 'a residue test'],
];

/**
 * Reads the open laboratory-data standard: version 1 as XML or JSON, and its slim JSON. Files without test codes are
 * taken; units come from the file, never from a code; recommendations in it are left alone, as they name no method of
 * computing. A number's place is the line and character at which it begins. Errors: none are thrown for content.
 */
export function readLabData(input: { fileName: string; root: DataNode }): Reading {
  const { fileName: file, root } = input;
  const slim = isSlim(root);
  const events =
    root.name.toLowerCase() === 'event' || childrenOf(root, 'Event').length + childrenOf(root, 'Events').length > 0;
  if (!slim && !events) return refusedReading({ file, pages: 0, error: NOT_LAB_DATA });
  const found = slim ? readSlim(root) : readEvents(root);
  const warnings = [...found.warnings];
  const lab = { name: found.lab };
  const base = { file, error: null, pages: 0, lab, recommendations: [] };
  if (found.others.length > 0) {
    const type = found.others.find((one) => one !== '') ?? '';
    const what = MATERIALS.find(([pattern]) => pattern.test(type))?.[1] ?? 'another kind of test';
    const none = found.parts.length === 0;
    warnings.push(
      remark(
        'not-soil',
        `This looks like ${what}, not a soil test; ${none ? 'nothing' : 'only the soil'} of it was taken.`,
      ),
    );
    if (none) return { ...base, kind: 'not-soil', warnings, samples: [] };
  }
  const dates = found.parts.flatMap((part) => [part.identity.dateSampled ?? '', part.identity.dateReported ?? '']);
  const { samples, warnings: more } = assemble({
    parts: found.parts,
    statements: { unit: null, methods: new Map() },
    dateTexts: dates.filter((text) => ANY_DATE.test(text)),
  });
  if (samples.length === 0) return refusedReading({ file, pages: 0, error: NO_RESULTS });
  return { ...base, kind: 'soil', warnings: [...warnings, ...more], samples };
}
