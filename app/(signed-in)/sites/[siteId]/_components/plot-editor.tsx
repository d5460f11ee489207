'use client';

import { useRouter } from 'next/navigation';
import { type ReactNode, useState } from 'react';
import type { Plot } from '@/lib/schemas/plots';
import type { TargetList } from '@/lib/schemas/targets';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { callApi, type Problem } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Form } from '@/lib/ui/fields/form';
import { asRectangle } from '@/lib/ui/site-plan/geometry';
import type { LengthUnit } from '@/lib/ui/site-plan/types';
import { plotDifferences } from './plot-differences';
import { PlotFields } from './plot-fields';
import { asPlotValues, type PlotValues, plotValues, readPlotValues } from './plot-values';
import { plotOf } from './use-outline-saves';
import { VersionConflict } from './version-conflict';

type PlotEditorProps = {
  readonly siteId: string;
  readonly unit: LengthUnit;
  readonly year: number;
  readonly targets: TargetList;
  /** Null: a new plot. */
  readonly plot: Plot | null;
  readonly children?: ReactNode;
};

/** All facts of a plot in one form; saves what was changed, with the version that was on screen. */
export function PlotEditor({ siteId, unit, year, targets, plot, children }: PlotEditorProps) {
  const router = useRouter();
  const announce = useAnnounce();
  // What the person saw; after a conflict, what stands there now. A new plot whose crop was refused is one that exists.
  const [base, setBase] = useState(plot);
  const [mine, setMine] = useState<PlotValues | null>(null);
  const [theirs, setTheirs] = useState<Plot | null>(null);
  const [problem, setProblem] = useState<Problem>();
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [busy, setBusy] = useState(false);
  const before = plotValues(base, unit);
  const home = `/sites/${siteId}`;

  const writePlanting = async (plotId: string, planting: { crop: string; targetSetKey: string | null } | 'none') =>
    callApi<Plot>(
      `${home}/plots/${plotId}/plantings/${year}`,
      planting === 'none' ? { method: 'DELETE' } : { method: 'PUT', body: planting },
    );

  const submit = async (values: PlotValues, over: Plot | null) => {
    if (busy) return;
    setMine(values);
    setTheirs(null);
    setProblem(undefined);
    const read = readPlotValues(values, before, base?.outline ?? null, unit);
    setErrors(read.ok ? {} : read.errors);
    if (!read.ok) return;
    setBusy(true);
    let kept = over ?? base;
    if (!kept || Object.keys(read.plot).length > 0) {
      const result = kept
        ? await callApi<Plot>(`${home}/plots/${kept.id}`, {
            method: 'PATCH',
            body: { ...read.plot, version: kept.version },
          })
        : await callApi<Plot>(`${home}/plots`, { method: 'POST', body: read.plot });
      if (!result.ok) {
        setBusy(false);
        const current = plotOf(result.problem);
        if (current) setTheirs(current);
        else setProblem(atFields(result.problem, {}));
        return;
      }
      kept = result.data;
      setBase(kept);
    }
    if (read.planting !== 'unchanged') {
      const result = await writePlanting(kept.id, read.planting);
      if (!result.ok) {
        setBusy(false);
        setProblem(atFields(result.problem, { targetSetKey: 'cropSetKey' }));
        return;
      }
    }
    announce(`${kept.name} is saved.`, { tone: 'saved' });
    router.push(home);
    router.refresh();
  };
  const takeTheirs = () => {
    setBase(theirs);
    setMine(null);
    setTheirs(null);
  };

  return (
    <Form
      key={base?.version ?? 0}
      problem={problem}
      errors={errors}
      onSubmit={(values) => submit(asPlotValues(values), null)}
    >
      {theirs && mine ? (
        <VersionConflict
          subject={theirs.name}
          differences={plotDifferences(mine, before, plotValues(theirs, unit), targets)}
          busy={busy}
          onKeepTheirs={takeTheirs}
          onSaveYours={() => void submit(mine, theirs)}
        />
      ) : null}
      <PlotFields
        values={mine ?? before}
        unit={unit}
        year={year}
        targets={targets}
        freeShape={base?.outline != null && asRectangle(base.outline) === null}
      />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" busy={busy} busyLabel="Saving">
          {plot ? 'Save the plot' : 'Add the plot'}
        </Button>
        <LinkButton look="plain" href={home}>
          Back to the plan
        </LinkButton>
        {children}
      </div>
    </Form>
  );
}

/** The server speaks of the outline as one; the form has four fields for it. */
function atFields(problem: Problem, renamed: Readonly<Record<string, string>>): Problem {
  if (!problem.fields) return problem;
  const names: Readonly<Record<string, string>> = { outline: 'width', ...renamed };
  const fields = Object.entries(problem.fields).map(([name, said]) => [
    names[name.split('.')[0] ?? name] ?? name,
    said,
  ]);
  return { ...problem, fields: Object.fromEntries(fields) };
}
