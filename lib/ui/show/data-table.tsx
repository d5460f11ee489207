import { type ReactNode, useId } from 'react';
import { cx } from '../cx';

export type Column<Row> = {
  key: string;
  head: ReactNode;
  cell: (row: Row) => ReactNode;
  /** Right-aligned figures of equal width. */
  numeric?: boolean;
  /** This column names the row. */
  rowHead?: boolean;
};

export type DataTableProps<Row> = {
  caption: string;
  /** The heading above already says it. */
  hideCaption?: boolean;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  /** One sentence in place of rows. */
  empty?: ReactNode;
};

/** A real table; when it is wider than the screen only the table scrolls, and it can be scrolled by keyboard. */
export function DataTable<Row>({ caption, hideCaption, columns, rows, rowKey, empty }: DataTableProps<Row>) {
  const id = useId();
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a part that scrolls must be reachable by keyboard (WCAG 2.1.1)
    <section className="scroll-frame border-y border-horizon-5" aria-labelledby={id} tabIndex={0}>
      <table className="w-full border-collapse">
        <caption id={id} className={hideCaption ? 'sr-only' : 'px-4 pt-3 pb-1 text-left font-semibold'}>
          {caption}
        </caption>
        <thead>
          <tr className="border-b-2 border-humus">
            {columns.map((column) => (
              <th
                key={column.key}
                scope="col"
                className={cx('px-4 py-2 align-bottom text-sm font-bold', column.numeric ? 'text-right' : 'text-left')}
              >
                {column.head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={rowKey(row)} className="border-b border-horizon-5 last:border-0">
              {columns.map((column) => {
                const look = cx(
                  'px-4 py-2.5 align-top',
                  column.numeric ? 'text-right font-figures whitespace-nowrap' : 'min-w-32 text-left',
                );
                return column.rowHead ? (
                  <th key={column.key} scope="row" className={cx(look, 'font-semibold')}>
                    {column.cell(row)}
                  </th>
                ) : (
                  <td key={column.key} className={look}>
                    {column.cell(row)}
                  </td>
                );
              })}
            </tr>
          ))}
          {rows.length === 0 ? (
            <tr>
              <td colSpan={columns.length} className="px-4 py-5 text-clay">
                {empty ?? 'Nothing here yet.'}
              </td>
            </tr>
          ) : null}
        </tbody>
      </table>
    </section>
  );
}
