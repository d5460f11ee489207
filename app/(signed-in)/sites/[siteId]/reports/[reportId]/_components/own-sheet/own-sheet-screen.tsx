'use client';

import { type ReactNode, useState } from 'react';
import { can, type Role } from '@/lib/access/table';
import type { ColumnMeaningInput, OwnSheet, SheetImported, SheetMapping } from '@/lib/schemas/ownSheets';
import { Button } from '@/lib/ui/actions/button';
import { callApi, type Problem } from '@/lib/ui/api';
import { cx } from '@/lib/ui/cx';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { SelectField } from '@/lib/ui/fields/select-field';
import { counted, onDay } from '../report-words';
import { ColumnCard } from './column-card';
import { comingOf, DATE_ORDER_CHOICES } from './meanings';
import { SheetPreview } from './sheet-preview';
import { type SheetSaves, useSheetSaves } from './use-sheet-saves';

type ScreenProps = { path: string; role: Role; first: OwnSheet; onImported: () => Promise<void> };

/** Columns, plots, what comes of it, and the one button that brings it in. */
export function OwnSheetScreen({ path, role, first, onImported }: ScreenProps) {
  const saves = useSheetSaves(path, first);
  const { sheet } = saves;
  const [chosen, setChosen] = useState<Readonly<Record<string, string>>>({});
  const plotOf = (name: string): string | null => {
    const mine = chosen[name];
    if (mine !== undefined) return mine === '' ? null : mine;
    return sheet.names.find((one) => one.name === name)?.plotId ?? null;
  };
  if (!sheet.mapping) return null;
  return (
    <>
      {sheet.report.withdrawnReason ||
      sheet.rememberedOn ||
      sheet.report.warnings.length > 0 ||
      sheet.doubts.length > 0 ? (
        <div className="page-wrap max-w-[110rem]! grid gap-4 pb-2">
          <Said sheet={sheet} />
        </div>
      ) : null}
      <Part title="1. What each column holds">
        <Columns mapping={sheet.mapping} saves={saves} />
      </Part>
      <Part title="2. Which plot each name is" ground="white">
        <p className="mb-4 max-w-measure text-clay">Names without a plot are left out; they stay in the file.</p>
        <ul className="grid gap-x-8 gap-y-3 sm:grid-cols-2 lg:grid-cols-3">
          {sheet.names.map((one) => (
            <li key={one.name}>
              <SelectField
                name={`plot-${one.name}`}
                label={`${one.name} (${counted(one.samples, 'sample')})`}
                prompt="leave out"
                options={sheet.plots.map((plot) => ({ value: plot.id, label: plot.name }))}
                value={plotOf(one.name) ?? ''}
                onChange={(event) => setChosen({ ...chosen, [one.name]: event.currentTarget.value })}
                {...(one.withoutDay > 0 ? { hint: `${counted(one.withoutDay, 'sample')} without a day` } : {})}
              />
            </li>
          ))}
        </ul>
      </Part>
      <Part title="3. What comes of it">
        <SheetPreview sheet={sheet} plotOf={plotOf} />
      </Part>
      <ImportBar
        path={path}
        sheet={sheet}
        saving={saves.busy}
        plotOf={plotOf}
        decides={can(role, 'reading.decide')}
        onImported={onImported}
      />
    </>
  );
}

/** As wide as the head of the report above it. */
function Part({ title, ground, children }: { title: string; ground?: 'white'; children: ReactNode }) {
  return (
    <section className={cx('py-7', ground === 'white' && 'border-y border-horizon-5 bg-white')}>
      <div className="page-wrap max-w-[110rem]!">
        <h2 className="mb-4 text-xl">{title}</h2>
        {children}
      </div>
    </section>
  );
}

function Said({ sheet }: { sheet: OwnSheet }) {
  return (
    <>
      {sheet.report.withdrawnReason ? (
        <Notice tone="look" title="It was taken back">
          {sheet.report.withdrawnReason}
        </Notice>
      ) : null}
      {sheet.rememberedOn ? (
        <Notice title={`Columns as you read these headings on ${onDay(sheet.rememberedOn)}`}>
          Look them over; what you change now is kept for the next sheet like this.
        </Notice>
      ) : null}
      {[...sheet.report.warnings, ...sheet.doubts].map((one) => (
        <Notice key={`${one.code} ${one.sentence}`} tone="look">
          {one.sentence}
        </Notice>
      ))}
    </>
  );
}

function Columns({ mapping, saves }: { mapping: SheetMapping; saves: SheetSaves }) {
  const { sheet } = saves;
  const setMeaning = (column: number, meaning: ColumnMeaningInput) =>
    saves.save({
      ...mapping,
      columns: mapping.columns.map((one) => (one.column === column ? { ...one, meaning } : one)),
    });
  const dated = mapping.dateOrder !== 'unknown' || sheet.problems.some((one) => one.code === 'date-ambiguous');
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <div className="grid gap-4 sm:max-w-2xl sm:grid-cols-2">
        {sheet.sheets.length > 1 ? (
          <SelectField
            name="sheet"
            label="Sheet of the workbook"
            options={sheet.sheets.map((one) => ({
              value: String(one.number),
              label: `${one.name ?? one.number} (${counted(one.rows, 'line')})`,
            }))}
            value={String(mapping.sheet)}
            onChange={(event) => saves.openSheet(Number(event.currentTarget.value), mapping.dateOrder)}
          />
        ) : null}
        {dated ? (
          <SelectField
            name="date-order"
            label="Days like 3/4/2024 are written"
            options={DATE_ORDER_CHOICES}
            value={mapping.dateOrder}
            onChange={(event) => {
              const order = event.currentTarget.value;
              if (order === 'day-first' || order === 'month-first' || order === 'unknown')
                saves.save({ ...mapping, dateOrder: order });
            }}
          />
        ) : null}
      </div>
      {saves.problem ? <ProblemNotice problem={saves.problem} /> : null}
      <ul aria-label="Columns of the sheet" className="border-t border-horizon-5">
        {mapping.columns.map((column) => (
          <ColumnCard
            key={column.column}
            column={column}
            layout={mapping.layout}
            onMeaning={(meaning) => setMeaning(column.column, meaning)}
          />
        ))}
      </ul>
      <p role="status" className="text-sm text-clay">
        {saves.busy
          ? 'Saving what the columns hold'
          : 'Kept as you choose, and for the next sheet with these headings.'}
      </p>
    </div>
  );
}

type BarProps = {
  path: string;
  sheet: OwnSheet;
  saving: boolean;
  plotOf: (name: string) => string | null;
  decides: boolean;
  onImported: () => Promise<void>;
};

function ImportBar({ path, sheet, saving, plotOf, decides, onImported }: BarProps) {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const announce = useAnnounce();
  const coming = comingOf(sheet.names, plotOf);
  const bring = async () => {
    if (busy || !sheet.mapping) return;
    setBusy(true);
    setProblem(undefined);
    const { sheet: number, dateOrder, columns } = sheet.mapping;
    const result = await callApi<SheetImported>(`${path}/sheet/import`, {
      method: 'POST',
      body: {
        version: sheet.report.version,
        sheet: number,
        dateOrder,
        columns: columns.map(({ column, meaning }) => ({ column, meaning })),
        plots: sheet.names.map(({ name }) => ({ name, plotId: plotOf(name) })),
      },
      timeoutMs: 60_000,
    });
    if (!result.ok) {
      setProblem(result.problem);
      setBusy(false);
      if (result.problem.status === 409) await onImported();
      return;
    }
    const known =
      result.data.known > 0 ? ` ${counted(result.data.known, 'sample')} stood there already and count once.` : '';
    announce(
      `Brought in: ${counted(result.data.results, 'value')} of ${counted(result.data.samples, 'sample')}.${known}`,
      { tone: 'saved' },
    );
    await onImported();
  };
  const lacks = saving
    ? 'the columns are being saved'
    : coming.samples === 0
      ? 'no sample has a plot and a day yet'
      : null;
  return (
    <section aria-label="Bring it in" className="no-print z-20 border-t-2 border-gley bg-chalk md:sticky md:bottom-0">
      <div className="page-wrap max-w-[110rem]! grid gap-2 py-3">
        {problem ? <ProblemNotice problem={problem} /> : null}
        <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
          <p className="min-w-0 flex-1 basis-64" role="status">
            {counted(coming.samples, 'sample')} with a plot and a day
            {coming.leftOut > 0 ? `, ${coming.leftOut} left out` : ''}. They stand as typed by you and can be taken
            back.
          </p>
          {decides ? (
            <Button
              className="max-sm:w-full"
              busy={busy}
              busyLabel="Bringing it in"
              unavailable={lacks ?? false}
              onClick={() => void bring()}
            >
              Bring in {counted(coming.samples, 'sample')}
            </Button>
          ) : (
            <p className="font-semibold">An owner or adviser brings it in.</p>
          )}
        </div>
      </div>
    </section>
  );
}
