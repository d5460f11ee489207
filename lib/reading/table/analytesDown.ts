import type { Candidate, Identity, SamplePart } from '../candidate';
import { unitOnly } from '../labels/label';
import type { ReadRecommendation } from '../types';
import { adviceInWords, adviceItem, isAdviceRow, isAdviceUnit } from './advice';
import { type Beside, candidateOf } from './candidates';
import type { Facts } from './facts';
import { DATE_ASSUMED, fieldOf, isBareDate } from './fields';
import { withoutRole } from './headingRole';
import { chosenColumns, columnsFor, type Kind, type ListColumn, labelColumn, nearest } from './listColumns';
import { fieldIn, identityOfColumn, isNamed, rowIdentity, sampleOver, sectionAt, sharedOf } from './listIdentity';
import { otherMaterial } from './material';
import { isNoSample } from './names';
import { spoken } from './spoken';
import { keyOf, type Ledger, type NotResult, note, type Shape } from './types';

const ADVICE = /^(recommendation|recommended|advice|application|rec|fertili[sz]er)s?$/i;

/** How the columns of one list are to be read. */
type Plan = {
  readonly labelAt: number;
  readonly rows: readonly number[];
  readonly columns: readonly ListColumn[];
  /** Columns whose numbers are results. */
  readonly chosen: readonly ListColumn[];
  /** Each of them is a sample of its own. */
  readonly across: boolean;
  /** The sample's name stands in each row. */
  readonly namesInRows: boolean;
  readonly kindAt: number | null;
  readonly identityAt: (column: number) => Identity;
};

function planOf(facts: Facts, free: readonly number[]): Plan | null {
  const found = labelColumn(facts, free);
  if (found === null) return null;
  const { at: labelAt, rows } = found;
  const [first = 0, last = 0] = [rows[0], rows[rows.length - 1]];
  const columns = columnsFor(facts, rows, first, labelAt);
  const namesInRows = columns.some(
    (one) =>
      one.kind === 'identity' &&
      ['sampleId', 'labNumber', 'fieldName'].includes(fieldOf(one.head) ?? '') &&
      rows.some((row) => facts.at(row, one.at) !== ''),
  );
  const known = new Map<number, Identity>();
  const identityAt = (column: number) => {
    const identity = known.get(column) ?? identityOfColumn(facts, free, last, labelAt, column);
    known.set(column, identity);
    return identity;
  };
  const choice = chosenColumns(columns, namesInRows, (column) => isNamed(identityAt(column)));
  const kindAt = columns.find((one) => one.kind === 'kind')?.at ?? null;
  return { labelAt, rows, columns, ...choice, namesInRows, kindAt, identityAt };
}

/** Heading lines over the list belong to it; the lines over those are titles. */
function rowsUsed(facts: Facts, plan: Plan, free: ReadonlySet<number>): Set<number> {
  const used = new Set<number>(plan.rows);
  const first = plan.rows[0] ?? 0;
  for (let row = Math.max(0, first - 3); row < first; row++) {
    const heads = plan.columns.some((one) => one.head !== '' && facts.at(row, one.at) === one.head);
    if (heads && free.has(row)) used.add(row);
  }
  return used;
}

function besideAt(facts: Facts, plan: Plan, row: number, column: ListColumn, hasUnit: boolean): Beside {
  const results = plan.chosen.map((one) => one.at);
  const cell = (kind: Kind) => {
    const at = nearest(plan.columns, kind, column.at, !plan.across, results);
    return at === null ? '' : facts.at(row, at);
  };
  const unit = cell('unit');
  const headUnit = unitOnly(spoken(column.head)) === null ? '' : column.head;
  return {
    unit: unit === '' && !hasUnit ? headUnit : unit,
    method: cell('method'),
    rating: cell('rating'),
    qualifier: cell('qualifier'),
  };
}

function notResultOf(column: ListColumn): NotResult {
  const notes: Partial<Record<Kind, NotResult>> = {
    identity: 'identity',
    desired: 'desired',
    previous: 'previous',
    recommendation: 'recommendation',
    limit: 'limit',
    difference: 'difference',
    date: 'date',
  };
  return notes[column.kind] ?? (column.year === null ? 'other-column' : 'previous');
}

/** Walks the rows of a list with what has been said of the sample so far. */
class Walk {
  readonly parts = new Map<string, { identity: Identity; candidates: Candidate[] }>();
  readonly recommendations: ReadRecommendation[] = [];
  other: string | null = null;
  private section: Identity = {};
  private own: Identity = {};
  private since = -1;
  constructor(
    private readonly facts: Facts,
    private readonly plan: Plan,
    private readonly free: ReadonlySet<number>,
    private readonly ledger: Ledger | null,
  ) {}

  private hear(row: number) {
    const said = sectionAt(this.facts, this.free, row, this.since);
    this.since = row;
    this.section = isNamed(said) ? { ...sharedOf(this.section), ...said } : { ...this.section, ...said };
    if (!this.plan.namesInRows) return;
    const own = rowIdentity(this.facts, this.plan.columns, row);
    // A name said once holds for the rows under it.
    this.own = isNamed(own) || own.fieldName !== undefined ? own : { ...this.own, ...own };
  }

  private identityFor(column: ListColumn): Identity {
    if (this.plan.namesInRows) return { ...sharedOf(this.section), ...this.own };
    const ofColumn = this.plan.identityAt(column.at);
    if (this.plan.across) return { ...sampleOver(column), ...ofColumn };
    return isNamed(this.section) ? this.section : { ...this.section, ...ofColumn };
  }

  private advise(row: number, column: number, item: string, amount: number | null, unit: string | null) {
    const sampleId = this.own.sampleId ?? this.section.sampleId ?? null;
    const printed = this.facts.at(row, column);
    this.recommendations.push({ sampleId, item, amount, printed, unit, page: null, box: null });
  }

  /** A column headed "Lime Rec" advises lime; one headed "Recommendation" advises on the row's analyte. */
  private itemOf(column: ListColumn, name: string): string {
    return withoutRole(column.head) === '' ? name : adviceItem(column.head);
  }

  private besideResult(row: number, column: ListColumn) {
    const { facts, plan } = this;
    const name = facts.at(row, plan.labelAt);
    const meaning = facts.meaning(row, column.at);
    if (meaning.kind === 'value') note(this.ledger, row, column.at, notResultOf(column));
    if (column.kind !== 'recommendation') return;
    if (meaning.kind === 'value') {
      const unit = meaning.unit ?? facts.label(row, plan.labelAt)?.unit ?? null;
      this.advise(row, column.at, this.itemOf(column, name), meaning.value, unit);
    } else if (meaning.kind === 'text') {
      const sampleId = this.own.sampleId ?? this.section.sampleId ?? null;
      const advice = adviceInWords(facts.at(row, column.at), sampleId, this.itemOf(column, name));
      if (advice !== null) this.recommendations.push(advice);
    }
  }

  row(row: number) {
    const { facts, plan, ledger } = this;
    const label = facts.label(row, plan.labelAt);
    if (label === null) return;
    this.hear(row);
    const name = facts.at(row, plan.labelAt);
    const kind = plan.kindAt === null ? '' : facts.at(row, plan.kindAt);
    const noSample = this.own.sampleId !== undefined && isNoSample(this.own.sampleId, this.own);
    for (const column of plan.columns) {
      if (!plan.chosen.includes(column)) {
        this.besideResult(row, column);
        continue;
      }
      const meaning = facts.meaning(row, column.at);
      if (meaning.kind !== 'value') continue;
      const place = { sheet: facts.sheet.number, row, column: column.at };
      const beside = besideAt(facts, plan, row, column, label.unit !== null);
      const candidate = candidateOf({ ...label, text: name }, meaning, place, beside);
      const material = otherMaterial(kind);
      this.other ??= material;
      const why: NotResult | null =
        material !== null ? 'not-soil' : ADVICE.test(kind) ? 'recommendation' : noSample ? 'summary-row' : null;
      const advice =
        why === 'recommendation' ||
        (why === null && (isAdviceUnit(candidate.unit) || isAdviceRow(name, candidate.unit)));
      if (advice) this.advise(row, column.at, name, meaning.value, candidate.unit);
      if (advice || why !== null) {
        note(ledger, row, column.at, why ?? 'recommendation');
        continue;
      }
      note(ledger, row, column.at, 'taken');
      const identity = this.identityFor(column);
      const key = JSON.stringify(plan.across ? [column.at, identity] : identity);
      const part = this.parts.get(key) ?? { identity, candidates: [] };
      part.candidates.push(candidate);
      this.parts.set(key, part);
    }
  }
}

/** "Potassium index 2" on a line of its own is how the laboratory rates the potassium of another line. */
function withClasses(candidates: readonly Candidate[], ledger: Ledger | null): Candidate[] {
  const classOf = (one: Candidate) => /\bindex$/i.test(one.label.text.trim()) && /^\d[+-]?$/.test(one.value.printed);
  const weighed = candidates.filter((one) => !classOf(one) && one.unit !== null && one.unit !== 'index');
  const classes = candidates.filter(
    (one) => classOf(one) && weighed.some((other) => other.label.analyte === one.label.analyte),
  );
  for (const { cell } of classes) if (cell !== null) ledger?.set(keyOf(cell.row - 1, cell.column - 1), 'other-column');
  return candidates
    .filter((one) => !classes.includes(one))
    .map((one) => {
      const found = weighed.includes(one)
        ? classes.find((other) => other.label.analyte === one.label.analyte)
        : undefined;
      return found === undefined || one.rating !== null ? one : { ...one, rating: found.value.printed };
    });
}

/** Stage "analytes down": one row a number, or one row an analyte with one sample or several across. */
export function analytesDown(facts: Facts, freeRows: readonly number[], ledger: Ledger | null): Shape | null {
  const plan = planOf(facts, freeRows);
  if (plan === null) return null;
  const free = new Set(freeRows);
  const walk = new Walk(facts, plan, free, ledger);
  for (const row of plan.rows) walk.row(row);
  const parts: SamplePart[] = [...walk.parts.values()].map((part) => ({
    ...part,
    candidates: withClasses(part.candidates, ledger),
  }));
  if (parts.length === 0 && walk.other === null) return null;
  const assumed = plan.columns.some(
    (one) => one.kind === 'identity' && isBareDate(one.head) && fieldIn(plan.columns, one.head) === 'dateSampled',
  );
  const remarks = assumed ? [DATE_ASSUMED] : [];
  const { recommendations, other } = walk;
  return { parts, recommendations, rows: rowsUsed(facts, plan, free), remarks, other };
}
