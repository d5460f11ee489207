'use client';

import { useRef, useState } from 'react';
import { analyte, isAnalyteKey } from '@/lib/domain/analytes';
import { centimetres, figures, formatArea, formatMass, kilograms, squareMetres, toInches } from '@/lib/domain/units';
import type { ApplicationAnswer } from '@/lib/schemas/applications';
import { Button } from '@/lib/ui/actions/button';
import { formatDay, formatSigned, withUnit } from '@/lib/ui/charts/numbers';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Stretch } from '@/lib/ui/frame/layers';
import { Timeline } from '@/lib/ui/show/timeline';
import { useApi } from '@/lib/ui/use-api';
import { shortLabel } from '../../_components/history-props';
import { depthUnit, type Units } from './application-body';
import { CorrectRecord, RemoveRecord } from './change-record';
import { RecordForm } from './record-form';

type List = { applications: ApplicationAnswer[] };

export type PlotRecordsProps = {
  siteId: string;
  plotId: string;
  first: List;
  units: Units;
  today: string;
  plotAreaM2: number | null;
  may: { record: boolean; correctOwn: boolean; correctAny: boolean };
};

/** What was spread on this plot, newest first, and the form for the next. */
export function PlotRecords({ siteId, plotId, first, units, today, plotAreaM2, may }: PlotRecordsProps) {
  const {
    data = first,
    problem,
    reload,
  } = useApi<List>(`/sites/${siteId}/applications?plotId=${plotId}`, {
    fallback: first,
  });
  const [writing, setWriting] = useState(false);
  const opener = useRef<HTMLButtonElement>(null);
  const records = data.applications.toReversed();
  const close = () => {
    setWriting(false);
    // The button comes back in the same paint; the focus goes to it rather than to the top of the page.
    requestAnimationFrame(() => opener.current?.focus());
  };
  const start = (
    <Button ref={opener} onClick={() => setWriting(true)}>
      Record what was spread
    </Button>
  );
  return (
    <>
      {writing ? (
        <Stretch title="What was spread" ground="white">
          <RecordForm
            {...{ siteId, plotId, units, today, plotAreaM2 }}
            onCancel={close}
            onRecorded={() => {
              close();
              void reload();
            }}
          />
        </Stretch>
      ) : null}
      <Stretch>
        <div className="grid gap-6">
          <ProblemNotice problem={problem} />
          {records.length === 0 ? (
            <EmptyState
              shape="list"
              title="Nothing recorded on this plot yet"
              action={may.record && !writing ? start : null}
            >
              What was spread stands here with its day, its amount and the change it was meant to make. It marks the
              charts, and a later test is held against it.
            </EmptyState>
          ) : (
            <>
              {may.record && !writing ? <div>{start}</div> : null}
              <Timeline
                label="What was spread, newest first"
                items={records.map((record) => ({
                  key: record.id,
                  day: record.appliedOn,
                  dayLabel: formatDay(record.appliedOn),
                  mark: 'spread',
                  title: `${record.material.name}, ${record.amountPrinted}`,
                  children: (
                    <div className="grid gap-2">
                      <p>{recordWords(record, units)}</p>
                      {record.intents.map((intent) => (
                        <p key={intent.id} className="text-clay">
                          {intentWords(intent)}
                        </p>
                      ))}
                      {record.note === '' ? null : <p className="whitespace-pre-line break-words">{record.note}</p>}
                      <p className="text-sm text-clay">
                        Recorded by {record.recordedByName ?? 'somebody who has left'}
                      </p>
                      {may.correctAny || (may.correctOwn && record.mine) ? (
                        <div className="flex flex-wrap gap-3 print:hidden">
                          <CorrectRecord
                            {...{ siteId, record, units, today, plotAreaM2 }}
                            onChanged={() => void reload()}
                          />
                          <RemoveRecord siteId={siteId} record={record} onChanged={() => void reload()} />
                        </div>
                      ) : null}
                    </div>
                  ),
                }))}
              />
            </>
          )}
        </div>
      </Stretch>
    </>
  );
}

const SAME_KG = 1e-6;

export function recordWords(record: ApplicationAnswer, units: Units): string {
  const prefer = units === 'us' ? 'customary' : 'metric';
  const parts = [`On ${formatArea(squareMetres(record.areaM2), prefer)}`];
  if (Math.abs(record.plannedKg - record.amountKg) > SAME_KG) {
    parts.push(`${formatMass(kilograms(record.plannedKg), prefer)} was planned`);
  }
  if (record.depthCm !== null) {
    parts.push(
      record.depthCm === 0
        ? 'left on top'
        : `worked in ${figures(units === 'us' ? toInches(centimetres(record.depthCm)) : record.depthCm, 2)} ${depthUnit(units)} deep`,
    );
  }
  if (record.method !== '') parts.push(record.method);
  if (record.soilCondition !== '') parts.push(`soil ${record.soilCondition}`);
  return `${parts.join('; ')}.`;
}

export function intentWords(intent: ApplicationAnswer['intents'][number]): string {
  if (!isAnalyteKey(intent.analyte)) return '';
  const about = analyte(intent.analyte);
  const isPh = about.unit === 'pH';
  const size = (value: number) => formatSigned(value, isPh ? 2 : about.decimals);
  const [low, high] = [intent.low, intent.high].sort((x, y) => (x ?? 0) - (y ?? 0));
  const range = low == null || high == null ? '' : ` (${size(low)} to ${size(high)} by the rule)`;
  const change = withUnit(size(intent.fullChange), isPh ? '' : (intent.unit ?? about.unit));
  return `Meant for ${shortLabel(intent.analyte, about.label)}: ${change}${range}; ${intent.source}.`;
}
