'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { type OwnTargetSet, ownTargetSetSchema } from '@/lib/schemas/targets';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { DateField } from '@/lib/ui/fields/date-field';
import { Form } from '@/lib/ui/fields/form';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';
import { VersionConflict } from '../../_components/version-conflict';
import type { BandChoice } from './band-choices';
import { BandFields, type BandStart } from './band-fields';
import { bandField, readBands } from './band-values';
import { setDifferences } from './set-differences';

type TargetFormProps = {
  readonly siteId: string;
  /** Null: a new set. */
  readonly set: OwnTargetSet | null;
  readonly today: string;
  readonly choices: readonly BandChoice[];
};

const FIRST: BandStart = { analyte: 'soil_ph_water', low: '', high: '', unit: 'pH', method: null };

export function TargetForm({ siteId, set, today, choices }: TargetFormProps) {
  const router = useRouter();
  const announce = useAnnounce();
  const { send, busy, problem, clear } = useSubmit<OwnTargetSet>();
  const [base, setBase] = useState(set);
  const [rows, setRows] = useState(() => startRows(set));
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [mine, setMine] = useState<Record<string, string>>({});
  const home = `/sites/${siteId}/targets`;
  const ids = rows.map(({ id }) => id);
  const stale = problem?.reason === 'stale-version';
  const theirs = stale ? (ownTargetSetSchema.safeParse(problem?.current).data ?? null) : null;

  const save = async (values: Record<string, string>, version: number | undefined) => {
    setMine(values);
    const read = readBands(values, ids);
    setErrors(read.ok ? {} : read.errors);
    if (!read.ok) return;
    const facts = { name: values.name, validFrom: values.validFrom || undefined, bands: read.bands };
    const result = base
      ? await send(`${home}/${base.key}`, { method: 'PUT', body: { ...facts, version } })
      : await send(home, { body: facts });
    if (!result.ok) return;
    announce(`${result.data.name} is saved.`, { tone: 'saved' });
    router.push(home);
    router.refresh();
  };
  const takeTheirs = () => {
    setBase(theirs);
    setRows(startRows(theirs));
    clear();
  };
  const shown = problem?.fields
    ? {
        ...problem,
        fields: Object.fromEntries(Object.entries(problem.fields).map(([path, said]) => [bandField(path, ids), said])),
      }
    : problem;
  return (
    <Form
      key={base?.version ?? 0}
      problem={theirs ? undefined : shown}
      errors={errors}
      onSubmit={(values) => save(values, base?.version)}
    >
      {theirs ? (
        <VersionConflict
          subject={theirs.name}
          differences={setDifferences(mine, ids, theirs)}
          busy={busy}
          onKeepTheirs={takeTheirs}
          onSaveYours={() => void save(mine, theirs.version)}
        />
      ) : null}
      <TextField
        name="name"
        label="Name"
        hint="Exhibition onions, say."
        autoComplete="off"
        defaultValue={base?.name ?? ''}
      />
      <DateField
        name="validFrom"
        label="In force from"
        hint="Tests from this day on are held against it."
        defaultValue={today}
      />
      <div className="grid gap-6">
        {rows.map(({ id, start }, at) => (
          <BandFields
            key={id}
            row={id}
            at={at}
            start={start}
            choices={choices}
            onRemove={rows.length > 1 ? () => setRows(rows.filter((row) => row.id !== id)) : null}
          />
        ))}
      </div>
      <div className="flex flex-wrap gap-3 border-t border-horizon-5 pt-4">
        <Button type="submit" busy={busy} busyLabel="Saving">
          {base ? `Save version ${base.version + 1}` : 'Save the target set'}
        </Button>
        <Button look="quiet" onClick={() => setRows([...rows, nextRow(rows, choices)])}>
          Add a band
        </Button>
        <LinkButton look="plain" href={home}>
          Back to the target sets
        </LinkButton>
      </div>
    </Form>
  );
}

type Row = { readonly id: number; readonly start: BandStart };

const startRows = (set: OwnTargetSet | null): readonly Row[] =>
  (set?.bands ?? [FIRST]).map((start, at) => ({ id: at + 1, start }));

/** The next analyte that is not started with yet, so that adding does not begin with a refusal. */
function nextRow(rows: readonly Row[], choices: readonly BandChoice[]): Row {
  const taken = new Set(rows.map((row) => row.start.analyte));
  const free = choices.find((choice) => !taken.has(choice.key));
  const start = { analyte: free?.key ?? FIRST.analyte, low: '', high: '', unit: free?.unit ?? null, method: null };
  return { id: Math.max(0, ...rows.map((row) => row.id)) + 1, start };
}
