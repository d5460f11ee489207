'use client';

import { useState } from 'react';
import type { AmountUnit, ApplicationAnswer } from '@/lib/schemas/applications';
import { AMOUNT_UNITS } from '@/lib/schemas/applications';
import { Button } from '@/lib/ui/actions/button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Dialog } from '@/lib/ui/feedback/dialog';
import { Form } from '@/lib/ui/fields/form';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';
import { fieldErrors, OWN, readFields, type Units } from './application-body';
import { ApplicationFields, type Start, watchStart } from './application-fields';

type ChangeProps = {
  siteId: string;
  record: ApplicationAnswer;
  units: Units;
  today: string;
  plotAreaM2: number | null;
  onChanged: () => void;
};

/** "9 lb" back into its two fields. */
export function amountParts(printed: string, kg: number): { amount: string; amountUnit: AmountUnit } {
  const [amount = '', unit = ''] = printed.split(' ');
  const known = AMOUNT_UNITS.find((one) => one === unit);
  return known === undefined ? { amount: String(kg), amountUnit: 'kg' } : { amount, amountUnit: known };
}

export const startOf = (record: ApplicationAnswer): Start => ({
  material: record.material.key,
  ownName: record.material.key === OWN ? record.material.name : '',
  reaction: record.material.reaction ?? '',
  affects: record.material.key === OWN ? record.material.affects : [],
  ...amountParts(record.amountPrinted, record.amountKg),
  appliedOn: record.appliedOn,
  areaM2: record.areaM2,
  depthCm: record.depthCm,
  method: record.method,
  soilCondition: record.soilCondition,
  note: record.note,
});

export function CorrectRecord(props: ChangeProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button look="quiet" size="small" aria-haspopup="dialog" onClick={() => setOpen(true)}>
        Correct
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        size="wide"
        title="Correct this record"
        description="The record as it was stays in the trail, with who, when and why. What was planned and what it was meant to change stay as they are."
      >
        {open ? <CorrectForm {...props} onDone={() => setOpen(false)} /> : null}
      </Dialog>
    </>
  );
}

const NO_ERRORS: Record<string, string> = {};

function CorrectForm({
  siteId,
  record,
  units,
  today,
  plotAreaM2,
  onChanged,
  onDone,
}: ChangeProps & { onDone: () => void }) {
  const [start] = useState(() => startOf(record));
  const [watched, setWatched] = useState(() => watchStart(start, units));
  const [errors, setErrors] = useState(NO_ERRORS);
  const { send, busy, problem } = useSubmit();
  const announce = useAnnounce();
  const submit = async (values: Record<string, string>, data: FormData) => {
    const fields = readFields(values, data.getAll('material.affects').map(String), units, start);
    setErrors(fields.ok ? NO_ERRORS : fields.errors);
    if (!fields.ok) return;
    const body = { ...fields.body, reason: values.reason ?? '' };
    const result = await send(`/sites/${siteId}/applications/${record.id}`, { method: 'PUT', body });
    if (!result.ok) return;
    announce('The record is corrected.', { tone: 'saved' });
    onDone();
    onChanged();
  };
  const refused = problem && { ...problem, ...(problem.fields ? { fields: fieldErrors(problem.fields) } : {}) };
  return (
    <Form label="Correct this record" onSubmit={submit} problem={refused} errors={errors} className="max-w-5xl!">
      <ApplicationFields
        start={start}
        watched={watched}
        onWatch={(part) => {
          setErrors(NO_ERRORS);
          setWatched((before) => ({ ...before, ...part }));
        }}
        {...{ units, today, plotAreaM2 }}
      />
      <TextField name="reason" label="Why it is corrected" hint="A few words; they stay with the record." />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" busy={busy} busyLabel="Saving">
          Save the correction
        </Button>
        <Button look="quiet" onClick={onDone}>
          Leave it as it is
        </Button>
      </div>
    </Form>
  );
}

export function RemoveRecord({ siteId, record, onChanged }: Pick<ChangeProps, 'siteId' | 'record' | 'onChanged'>) {
  const [open, setOpen] = useState(false);
  const { send, busy, problem, clear } = useSubmit();
  const announce = useAnnounce();
  const submit = async (values: Record<string, string>) => {
    const body = { reason: values.reason ?? '' };
    const result = await send(`/sites/${siteId}/applications/${record.id}`, { method: 'DELETE', body });
    if (!result.ok) return;
    announce('The record is removed.', { tone: 'saved' });
    setOpen(false);
    onChanged();
  };
  return (
    <>
      <Button look="quiet" size="small" aria-haspopup="dialog" onClick={() => setOpen(true)}>
        Remove
      </Button>
      <Dialog
        open={open}
        onOpenChange={(next) => {
          clear();
          setOpen(next);
        }}
        title={`Remove ${record.material.name}, ${record.amountPrinted}?`}
        description="It leaves the charts, and its effect is no longer checked. The trail keeps it, with who, when and why."
      >
        <Form label="Remove this record" onSubmit={submit} problem={problem}>
          <TextField name="reason" label="Why it is removed" hint="Recorded twice, say, or on the wrong plot." />
          <div className="flex flex-wrap gap-3">
            <Button type="submit" look="destructive" busy={busy} busyLabel="Removing">
              Remove this record
            </Button>
            <Button look="quiet" onClick={() => setOpen(false)}>
              Keep it
            </Button>
          </div>
        </Form>
      </Dialog>
    </>
  );
}
