import type { DriftRow } from './csv';
import { changeDecimals, formatDay, formatRange, withUnit } from './numbers';
import type { ChartAnalyte } from './types';

interface DriftTableProps {
  readonly title: string;
  readonly rows: readonly DriftRow[];
  readonly analyte: ChartAnalyte;
  readonly locale?: string;
}

/** The chart as numbers: the reading for a screen reader, for print and for whoever prefers a table. */
export function DriftTable({ title, rows, analyte, locale }: DriftTableProps) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: several charts may share a title, so this is a group and no landmark
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls sideways must be reachable by keyboard
    <div role="group" className="overflow-x-auto" aria-label={`Numbers of ${title}`} tabIndex={0}>
      <table className="w-full border-collapse text-sm">
        <caption className="sr-only">{title}</caption>
        <thead>
          <tr className="border-b-2 border-humus text-left align-bottom">
            <Head>Day</Head>
            <Head right>{withUnit(analyte.label, analyte.unit === '' ? '' : `(${analyte.unit})`)}</Head>
            <Head>95% range</Head>
            <Head>Method, laboratory, depth</Head>
            <Head>Note</Head>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={`${row.kind} ${row.id}`} className="border-b border-fallow/40 align-top">
              <th scope="row" className="py-1 pr-4 text-left font-normal whitespace-nowrap">
                {row.href === undefined ? (
                  formatDay(row.on, locale)
                ) : (
                  <a href={row.href} className="text-link">
                    {formatDay(row.on, locale)}
                  </a>
                )}
              </th>
              <td className="py-1 pr-4 text-right font-figures whitespace-nowrap">{row.printed}</td>
              <td className="py-1 pr-4 font-figures whitespace-nowrap">
                {row.low !== null && row.high !== null && row.value !== null
                  ? formatRange(row.low, row.high, changeDecimals(analyte))
                  : ''}
              </td>
              <td className="min-w-40 py-1 pr-4">
                {[row.method, row.laboratory, row.depth].filter(Boolean).join(', ')}
              </td>
              <td className="min-w-40 py-1">{row.kind === 'amendment' ? `Spread: ${row.note}` : row.note}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function Head({ children, right = false }: { children: string; right?: boolean }) {
  return (
    <th scope="col" className={`py-1 pr-4 font-bold ${right ? 'text-right' : ''}`}>
      {children}
    </th>
  );
}
