import type { PageMark } from './types';

/** What is said when a row gets the focus. */
export function liveLine(mark: PageMark | undefined): string {
  if (!mark) return '';
  if (mark.box && mark.page !== null) return `Page ${mark.page}, row ${mark.rowNumber}: ${mark.label}`;
  const sheet = mark.cell?.sheet ?? 1;
  if (mark.cell && sheet > 1)
    return `Sheet ${sheet}, line ${mark.cell.row}, column ${mark.cell.column}, row ${mark.rowNumber}: ${mark.label}`;
  if (mark.cell) return `Line ${mark.cell.row}, column ${mark.cell.column}, row ${mark.rowNumber}: ${mark.label}`;
  return `Row ${mark.rowNumber}: ${mark.label}, entered by hand`;
}
