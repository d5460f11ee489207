import { CircleAlert } from 'lucide-react';
import { asDay, dayInWords } from '@/lib/domain/days';
import type { OwnSheet } from '@/lib/schemas/ownSheets';
import { DataTable } from '@/lib/ui/show/data-table';
import { counted } from '../report-words';
import { previewColumns, resultWords } from './meanings';

/** What the numbers would stand as, and which cannot. */
export function SheetPreview({ sheet, plotOf }: { sheet: OwnSheet; plotOf: (name: string) => string | null }) {
  const { samples, counts } = sheet;
  const rows = samples.map((sample, at) => ({ ...sample, at }));
  const columns = previewColumns(samples);
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <p className="max-w-measure text-clay">
        {counted(counts.results, 'value')} of {counted(counts.samples, 'sample')} from {counted(counts.rows, 'line')}.
        {counts.samples > samples.length ? ` The first ${samples.length} are shown.` : ''}
      </p>
      <DataTable
        caption="What comes of the sheet"
        hideCaption
        rows={rows}
        rowKey={(row) => String(row.at)}
        empty="No line of the sheet gives a value yet. Say above which column holds one."
        columns={[
          {
            key: 'name',
            head: 'Name in the sheet',
            rowHead: true,
            cell: (row) => <NameCell name={row.name} out={plotOf(row.name) === null || row.takenOn === null} />,
          },
          {
            key: 'day',
            head: 'Day',
            cell: (row) => (row.takenOn === null ? <Missing>no day</Missing> : dayInWords(asDay(row.takenOn))),
          },
          ...columns.map(({ key, head }) => ({
            key,
            head,
            numeric: true,
            cell: (row: (typeof rows)[number]) => {
              const found = row.results.filter((one) => resultWords(one) === key);
              return found.map((one) => (
                <span key={`${one.printed} ${one.method}`} className="block">
                  {one.printed}
                  {one.impossible ? <Missing>{one.impossible}</Missing> : null}
                </span>
              ));
            },
          })),
        ]}
      />
      <Problems sheet={sheet} />
    </div>
  );
}

function NameCell({ name, out }: { name: string; out: boolean }) {
  if (!out) return name;
  return (
    <>
      <span className="text-clay">{name}</span> <span className="block text-xs font-normal text-clay">left out</span>
    </>
  );
}

function Missing({ children }: { children: string }) {
  return (
    <span className="flex max-w-56 items-start gap-1 font-text text-xs whitespace-normal text-ochre">
      <CircleAlert aria-hidden="true" className="mt-px size-3.5 flex-none" />
      {children}
    </span>
  );
}

function Problems({ sheet }: { sheet: OwnSheet }) {
  if (sheet.problemCount === 0) return null;
  return (
    <details className="group" open={sheet.problemCount <= 8}>
      <summary className="text-link inline-flex min-h-(--target) items-center font-semibold">
        {counted(sheet.problemCount, 'thing')} to know about the lines
      </summary>
      <ul className="mt-2 max-w-measure divide-y divide-horizon-5 border-y border-horizon-5">
        {sheet.problems.map((one) => (
          <li key={`${one.row} ${one.column} ${one.code} ${one.text}`} className="py-2">
            <span className="font-semibold">Line {one.row}:</span> {one.sentence}
            {one.leftOut ? ' It is left out.' : ''}
          </li>
        ))}
      </ul>
      {sheet.problemCount > sheet.problems.length ? (
        <p className="mt-2 text-sm text-clay">And {sheet.problemCount - sheet.problems.length} more of this kind.</p>
      ) : null}
    </details>
  );
}
