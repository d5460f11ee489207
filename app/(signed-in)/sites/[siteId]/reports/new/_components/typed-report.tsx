'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { DateField } from '@/lib/ui/fields/date-field';
import { Form } from '@/lib/ui/fields/form';
import { type Option, SelectField } from '@/lib/ui/fields/select-field';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';
import { type DepthUnit, formField, OTHER_LABORATORY, readTyped } from './typed-values';

type TypedReportProps = {
  readonly siteId: string;
  readonly unit: DepthUnit;
  readonly plots: readonly Option[];
  readonly laboratories: readonly Option[];
  readonly today: string;
};

const MOST_SAMPLES = 100;

export function TypedReport({ siteId, unit, plots, laboratories, today }: TypedReportProps) {
  const router = useRouter();
  const { send, busy, problem } = useSubmit<{ reportId: string }>();
  const [rows, setRows] = useState<readonly number[]>([1]);
  const [laboratory, setLaboratory] = useState(laboratories[0]?.value ?? OTHER_LABORATORY);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [opening, setOpening] = useState(false);

  const begin = async (values: Record<string, string>) => {
    const read = readTyped(values, rows, unit);
    setErrors(read.ok ? {} : read.errors);
    if (!read.ok || opening) return;
    const result = await send(`/sites/${siteId}/reports`, { body: read.body });
    if (!result.ok) return;
    setOpening(true);
    router.push(`/sites/${siteId}/reports/${result.data.reportId}`);
  };
  const named = problem?.fields
    ? {
        ...problem,
        fields: Object.fromEntries(Object.entries(problem.fields).map(([path, said]) => [formField(path, rows), said])),
      }
    : problem;
  return (
    <Form problem={named} errors={errors} onSubmit={begin}>
      {laboratories.length > 0 ? (
        <SelectField
          name="laboratory"
          label="Laboratory"
          options={[...laboratories, { value: OTHER_LABORATORY, label: 'Another laboratory' }]}
          value={laboratory}
          onChange={(event) => setLaboratory(event.currentTarget.value)}
        />
      ) : null}
      {laboratory === OTHER_LABORATORY ? (
        <TextField
          name="laboratoryName"
          label={laboratories.length > 0 ? 'Name of the laboratory' : 'Laboratory'}
          hint="As it stands at the head of the page."
          optional={laboratories.length === 0}
          autoComplete="off"
        />
      ) : null}
      {rows.map((row, at) => (
        <fieldset key={row} className="grid gap-4 border-t border-horizon-5 pt-4">
          <legend className="contents">
            <span className="flex items-center justify-between gap-4">
              <span className="text-lg font-semibold">Sample {at + 1}</span>
            </span>
          </legend>
          <div className="grid gap-4 sm:grid-cols-2">
            <SelectField
              name={`plot-${row}`}
              label="Plot"
              options={plots}
              prompt={plots.length > 0 ? 'Choose later' : 'No plot yet: choose later'}
            />
            <DateField name={`day-${row}`} label="Day it was taken" max={today} optional />
          </div>
          <div className="grid gap-4 sm:grid-cols-2">
            <TextField name={`name-${row}`} label="Name on the report" optional autoComplete="off" />
            <TextField name={`number-${row}`} label="Laboratory number" optional autoComplete="off" />
          </div>
          <div className="grid grid-cols-2 items-end gap-4">
            <TextField
              name={`from-${row}`}
              label="Depth from"
              unit={unit}
              optional
              inputMode="decimal"
              autoComplete="off"
            />
            <TextField
              name={`to-${row}`}
              label="Depth to"
              unit={unit}
              optional
              inputMode="decimal"
              autoComplete="off"
            />
          </div>
          {rows.length > 1 ? (
            <div>
              <Button look="plain" onClick={() => setRows(rows.filter((one) => one !== row))}>
                Leave sample {at + 1} out
              </Button>
            </div>
          ) : null}
        </fieldset>
      ))}
      <div className="flex flex-wrap gap-3 border-t border-horizon-5 pt-4">
        <Button type="submit" busy={busy || opening} busyLabel="Opening the grid">
          Go on to the values
        </Button>
        <Button
          look="quiet"
          unavailable={rows.length >= MOST_SAMPLES && 'a report has at most 100 samples'}
          onClick={() => setRows([...rows, (rows.at(-1) ?? 0) + 1])}
        >
          Add another sample
        </Button>
        <LinkButton look="plain" href={`/sites/${siteId}/reports`}>
          Back to the reports
        </LinkButton>
      </div>
    </Form>
  );
}
