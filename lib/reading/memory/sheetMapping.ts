import { normal } from '../labels/normal';
import type { OwnColumn, OwnMapping } from '../ownSheet';
import { hashOf } from './layout';

const plainHeading = (column: OwnColumn) => normal(column.heading);

/** The headings of a grower's own sheet and how its rows are made; the same file with more rows has the same one. Pure. */
export function headingsFingerprint(mapping: OwnMapping): string {
  return hashOf([mapping.layout, ...mapping.columns.map(plainHeading)].join('\n'));
}

/**
 * What is proposed for a sheet, with the meanings that the grower gave the same headings before. A heading that stands
 * twice is taken in its order. Everything else of the proposal (sheet, row of the headings, examples) stays. Pure.
 */
export function withRemembered(proposal: OwnMapping, before: OwnMapping): OwnMapping {
  const left = [...before.columns];
  const columns = proposal.columns.map((column) => {
    const at = left.findIndex((one) => plainHeading(one) === plainHeading(column));
    const [known] = at < 0 ? [] : left.splice(at, 1);
    return known === undefined ? column : { ...column, meaning: known.meaning };
  });
  const dateOrder = proposal.dateOrder === 'unknown' ? before.dateOrder : proposal.dateOrder;
  return { ...proposal, columns, dateOrder };
}
