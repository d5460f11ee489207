'use client';

import { useState } from 'react';
import type { Report } from '@/lib/schemas/reports';
import type { Review } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { SelectField } from '@/lib/ui/fields/select-field';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';
import type { LiveReport } from './use-report';

type LaboratoryProps = { path: string; review: Review; report: Report; live: LiveReport; readOnly: boolean };

const NEW = 'new';

/** Which laboratory: one of the site's, or a new name; beside it what the page prints. */
export function LaboratoryField({ path, review, report, live, readOnly }: LaboratoryProps) {
  const { send, busy, problem } = useSubmit();
  const [naming, setNaming] = useState(false);
  const printed = report.laboratoryPrinted;
  if (readOnly) {
    return <p className="text-sm">Laboratory: {report.laboratory?.name ?? printed ?? 'not given'}</p>;
  }
  const save = async (body: { laboratoryId?: string | null; laboratoryName?: string }) => {
    const result = await send(path, { method: 'PATCH', body: { version: report.version, ...body } });
    if (result.ok) setNaming(false);
    await live.refresh();
  };
  const choose = (value: string) => {
    if (value === NEW) return setNaming(true);
    setNaming(false);
    void save({ laboratoryId: value || null });
  };
  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap items-end gap-x-4 gap-y-3">
        <SelectField
          name="laboratory"
          label="Laboratory"
          className="w-full sm:w-auto sm:grid-cols-[auto_20rem] sm:items-center sm:gap-x-4"
          prompt="Not given"
          options={[
            ...review.laboratories.map((one) => ({ value: one.id, label: one.name })),
            { value: NEW, label: 'Another one, not on the list' },
          ]}
          value={naming ? NEW : (report.laboratory?.id ?? '')}
          aria-busy={busy || undefined}
          onChange={(event) => choose(event.currentTarget.value)}
        />
        {naming ? (
          <form
            className="flex w-full flex-wrap items-end gap-3 sm:w-auto"
            onSubmit={(event) => {
              event.preventDefault();
              const name = String(new FormData(event.currentTarget).get('laboratoryName') ?? '').trim();
              void save({ laboratoryName: name });
            }}
          >
            <TextField
              name="laboratoryName"
              label="Its name"
              className="w-full sm:w-80"
              defaultValue={printed ?? ''}
              maxLength={120}
              autoFocus
            />
            <Button type="submit" look="quiet" busy={busy}>
              Use this name
            </Button>
          </form>
        ) : report.origin === 'typed' ? null : printed && report.laboratory?.name === printed ? (
          <p className="self-center text-sm text-clay">as printed</p>
        ) : printed && report.laboratory ? (
          <p className="self-center text-sm text-clay">printed: {printed}</p>
        ) : printed ? (
          <Button look="quiet" busy={busy} onClick={() => void save({ laboratoryName: printed })}>
            Use the printed name: {printed}
          </Button>
        ) : null}
      </div>
      <ProblemNotice problem={problem} />
    </div>
  );
}
