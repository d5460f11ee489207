import Link from 'next/link';
import type { Hemisphere } from '@/lib/domain/sampling';
import type { CompareAnswer } from '@/lib/schemas/effects';
import { CompareStrip } from '@/lib/ui/charts/compare-strip';
import { changeDecimals, formatDay, formatRange, withUnit } from '@/lib/ui/charts/numbers';
import { Layer } from '@/lib/ui/frame/layers';
import { type Column, DataTable } from '@/lib/ui/show/data-table';
import { RefusalBox } from '@/lib/ui/verdict/refusal-box';
import { compareAnalyte, compareProps, printedValue, refusalProps, shownUnit } from './compare-props';

type ComparedProps = { answer: CompareAnswer; siteId: string; hemisphere: Hemisphere };

/** What the two tests say to each other: a sentence, the drawing, the numbers. */
export function Compared({ answer, siteId, hemisphere }: ComparedProps) {
  const refusal = refusalProps(answer);
  const strip = compareProps(answer, hemisphere);
  const { outcome } = answer;
  return (
    <>
      <Layer depth="verdict">
        {refusal !== null ? (
          <RefusalBox {...refusal} />
        ) : outcome.ok ? (
          <div className="grid gap-3">
            <p className="font-display text-xl font-semibold">
              {outcome.moreThanNoise ? 'More than noise' : 'Not more than noise'}
            </p>
            <p className="max-w-measure text-lg leading-snug" data-testid="compared">
              {outcome.sentence}
            </p>
            {outcome.notes.map((note) => (
              <p key={note} className="max-w-measure text-clay">
                {note}
              </p>
            ))}
          </div>
        ) : null}
      </Layer>
      {strip === null ? null : (
        <Layer depth="chart">
          <CompareStrip {...strip} />
        </Layer>
      )}
      <Layer depth="numbers">
        <Sides answer={answer} siteId={siteId} />
      </Layer>
    </>
  );
}

function Sides({ answer, siteId }: { answer: CompareAnswer; siteId: string }) {
  const analyte = compareAnalyte(answer);
  const rows = [
    { key: 'first', ...answer.a },
    { key: 'second', ...answer.b },
  ];
  const columns: Column<(typeof rows)[number]>[] = [
    {
      key: 'plot',
      head: 'Plot and day',
      rowHead: true,
      cell: (row) => (
        <Link
          className="text-link"
          href={`/sites/${siteId}/plots/${row.plotId}?analyte=${encodeURIComponent(answer.analyte)}`}
        >
          {row.plotName}, {formatDay(row.takenOn)}
        </Link>
      ),
    },
    {
      key: 'value',
      head: analyte.label,
      numeric: true,
      cell: (row) => withUnit(printedValue(row, answer.decimals), shownUnit(row.unit)),
    },
    {
      key: 'range',
      head: '95% range',
      numeric: true,
      cell: (row) =>
        row.low === null || row.high === null
          ? 'not known'
          : formatRange(row.low, row.high, changeDecimals({ decimals: answer.decimals })),
    },
    { key: 'method', head: 'Method', cell: (row) => row.method ?? 'not stated' },
    { key: 'laboratory', head: 'Laboratory', cell: (row) => row.laboratory ?? 'not stated' },
  ];
  return <DataTable caption="The two tests" columns={columns} rows={rows} rowKey={(row) => row.key} />;
}
