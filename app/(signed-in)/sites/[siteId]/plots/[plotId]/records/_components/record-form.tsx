'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Form } from '@/lib/ui/fields/form';
import { useSubmit } from '@/lib/ui/use-submit';
import { fieldErrors, readFields, type Units } from './application-body';
import { ApplicationFields, type Start, watchStart } from './application-fields';
import { type IntentRow, readIntents } from './intents';
import { MeantChange } from './meant-change';

export type RecordFormProps = {
  siteId: string;
  plotId: string;
  units: Units;
  today: string;
  plotAreaM2: number | null;
  onRecorded: () => void;
  onCancel?: (() => void) | undefined;
};

const emptyStart = (units: Units, today: string): Start => ({
  material: '',
  ownName: '',
  reaction: '',
  affects: [],
  amount: '',
  amountUnit: units === 'us' ? 'lb' : 'kg',
  appliedOn: today,
  areaM2: null,
  depthCm: null,
  method: '',
  soilCondition: '',
  note: '',
});
const NO_ERRORS: Record<string, string> = {};

/** What was really spread, and what it was meant to do. */
export function RecordForm({ siteId, plotId, units, today, plotAreaM2, onRecorded, onCancel }: RecordFormProps) {
  const [start] = useState(() => emptyStart(units, today));
  const [watched, setWatched] = useState(() => watchStart(start, units));
  const [rows, setRows] = useState<readonly IntentRow[]>([{ key: 0, analyte: '', typed: '', from: null }]);
  const [errors, setErrors] = useState(NO_ERRORS);
  const [sent, setSent] = useState<readonly number[]>([]);
  const { send, busy, problem } = useSubmit<{ id: string }>();
  const announce = useAnnounce();

  const submit = async (values: Record<string, string>, data: FormData) => {
    const affects = data.getAll('material.affects').map(String);
    const fields = readFields(values, affects, units);
    const meant = readIntents(rows);
    if (!fields.ok || !meant.ok) {
      setErrors({ ...(fields.ok ? {} : fields.errors), ...(meant.ok ? {} : meant.errors) });
      return;
    }
    setErrors(NO_ERRORS);
    setSent(meant.keys);
    const body = { plotId, ...fields.body, intents: meant.intents };
    const result = await send(`/sites/${siteId}/applications`, { body });
    if (!result.ok) return;
    announce('The application is recorded.', { tone: 'saved' });
    onRecorded();
  };

  const refused = problem && { ...problem, ...(problem.fields ? { fields: fieldErrors(problem.fields, sent) } : {}) };
  return (
    <Form label="Record an application" onSubmit={submit} problem={refused} errors={errors} className="max-w-5xl!">
      <ApplicationFields
        start={start}
        watched={watched}
        onWatch={(part) => {
          setErrors(NO_ERRORS);
          setWatched((before) => ({ ...before, ...part }));
        }}
        {...{ units, today, plotAreaM2 }}
        planned
      >
        <MeantChange {...{ siteId, plotId, watched, units, rows }} onRows={setRows} />
      </ApplicationFields>
      <div className="flex flex-wrap gap-3">
        <Button type="submit" busy={busy} busyLabel="Recording">
          Record this application
        </Button>
        {onCancel ? (
          <Button look="quiet" onClick={onCancel}>
            Do not record
          </Button>
        ) : null}
      </div>
    </Form>
  );
}
