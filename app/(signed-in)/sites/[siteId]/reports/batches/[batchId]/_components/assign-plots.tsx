'use client';

import { useEffect, useRef, useState } from 'react';
import type { BatchSample, BatchSamples, PlotOutcomes } from '@/lib/schemas/batches';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { SelectField } from '@/lib/ui/fields/select-field';
import { counted } from '@/lib/ui/files/upload-item';
import { useLatest } from '@/lib/ui/grid/use-latest';
import { useApi } from '@/lib/ui/use-api';
import { useSubmit } from '@/lib/ui/use-submit';
import { SampleRow } from './sample-row';
import { useRows } from './use-rows';

type AssignProps = {
  home: string;
  path: string;
  first: BatchSamples;
  /** Changes when more of the batch is read or confirmed: then the samples are asked for anew. */
  moved: string;
};

const NO_PLOT = 'none';
/** As many as the route takes at once. */
const AT_ONCE = 500;

type Edit = { reportSampleId: string; version: number; plotId: string | null };

/** All samples of all reports that are read, in one list: choose several, set their plot at once. */
export function AssignPlots({ home, path, first, moved }: AssignProps) {
  const { data = first, problem, reload } = useApi<BatchSamples>(`${path}/samples`, { fallback: first });
  const { samples, plots } = data;
  const save = useSubmit<PlotOutcomes>();
  const announce = useAnnounce();
  const [plotId, setPlotId] = useState('');
  const [refused, setRefused] = useState<string[]>([]);
  const picker = useRef<HTMLFormElement>(null);
  const names = new Map(plots.map((plot) => [plot.id, plot.name]));
  const rows = useRows(
    samples.map((sample) => sample.id),
    () => picker.current?.querySelector('select')?.focus(),
  );
  const latest = useLatest(reload);
  const known = useRef(moved);
  useEffect(() => {
    if (known.current === moved) return;
    known.current = moved;
    void latest.current();
  }, [moved, latest]);

  const chosen = samples.filter((sample) => rows.selected.has(sample.id));
  const open = samples.filter((sample) => sample.plotId === null && !sample.leftOut);
  const proposed = open.filter((sample) => sample.proposal !== null);

  const write = async (edits: readonly Edit[], said: (saved: number) => string) => {
    const result = await save.send(`${path}/plots`, { method: 'PATCH', body: { edits: edits.slice(0, AT_ONCE) } });
    if (!result.ok) return;
    const { outcomes } = result.data;
    const saved = outcomes.filter((outcome) => outcome.kind === 'saved').length;
    setRefused([...new Set(outcomes.flatMap((outcome) => outcome.sentence ?? []))]);
    if (saved > 0) announce(said(saved), { tone: 'saved' });
    await reload();
    rows.setSelected([]);
    rows.focusActive();
  };
  const editOf = (sample: BatchSample, to: string | null): Edit => ({
    reportSampleId: sample.id,
    version: sample.version,
    plotId: to,
  });
  const setPlot = () => {
    const to = plotId === NO_PLOT ? null : plotId;
    const name = to === null ? 'no plot' : (names.get(to) ?? 'the plot');
    void write(
      chosen.map((sample) => editOf(sample, to)),
      (saved) => `${counted(saved, 'sample')}: ${name}.`,
    );
  };
  const takeProposals = () =>
    void write(
      proposed.map((sample) => editOf(sample, sample.proposal?.plotId ?? null)),
      (saved) => `${counted(saved, 'sample')} given the plot of their name.`,
    );

  if (samples.length === 0) return <p className="text-clay">The samples stand here as soon as the reports are read.</p>;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-3">
      <p className="max-w-measure" id="assign-help">
        {open.length === 0 ? 'Every sample has its plot.' : `${counted(open.length, 'sample')} without a plot.`} Choose
        rows with the space bar or a click, several with Shift, all with Ctrl+A; Enter goes to the plot.
      </p>
      <ProblemNotice problem={save.problem ?? problem} />
      {refused.length > 0 ? (
        <Notice tone="look" live title="Not all were changed">
          {refused.join(' ')}
        </Notice>
      ) : null}
      {plots.length === 0 ? (
        <Notice
          tone="look"
          title="No plot is drawn yet"
          action={<LinkButton href={`${home}/plots/new`}>Add a plot</LinkButton>}
        >
          Add the plots the samples are from; then they can be chosen here.
        </Notice>
      ) : null}
      <form
        ref={picker}
        className="sticky top-0 z-20 flex flex-wrap items-end gap-3 border-b-2 border-gley bg-white py-2"
        onSubmit={(event) => {
          event.preventDefault();
          if (chosen.length > 0 && plotId !== '') setPlot();
        }}
      >
        <SelectField
          name="plot"
          label={chosen.length === 0 ? 'Plot' : `Plot of ${counted(chosen.length, 'sample')}`}
          className="min-w-48 flex-1 sm:max-w-72"
          prompt="Choose a plot"
          value={plotId}
          onChange={(event) => setPlotId(event.target.value)}
          options={[
            ...plots.map((plot) => ({ value: plot.id, label: plot.name })),
            { value: NO_PLOT, label: 'No plot' },
          ]}
        />
        <Button
          type="submit"
          busy={save.busy}
          busyLabel="Setting it"
          unavailable={chosen.length === 0 ? 'choose samples first' : plotId === '' ? 'choose a plot first' : false}
        >
          Set the plot{chosen.length > 0 ? ` of ${chosen.length}` : ''}
        </Button>
        {open.length > 0 ? (
          <Button look="quiet" onClick={() => rows.setSelected(open.map((sample) => sample.id))}>
            Choose all without one
          </Button>
        ) : null}
        {proposed.length > 0 ? (
          <Button look="quiet" busy={save.busy} busyLabel="Setting them" onClick={takeProposals}>
            Take {proposed.length === 1 ? 'the proposed plot' : `the ${proposed.length} proposed plots`}
          </Button>
        ) : null}
      </form>
      <div className="max-h-[70vh] overflow-y-auto border-b border-horizon-5">
        <table
          ref={rows.grid}
          // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: its rows are chosen with keys, as the grid pattern has it
          role="grid"
          aria-label="Samples and their plots"
          aria-describedby="assign-help"
          aria-multiselectable="true"
          className="w-full text-left max-md:block"
          onKeyDown={rows.onKeyDown}
        >
          <thead className="sticky top-0 z-10 bg-white max-md:sr-only">
            <tr className="border-b border-fallow text-sm">
              <th scope="col" className="w-9">
                <span className="sr-only">Chosen</span>
              </th>
              {['Sample', 'Lab no.', 'Taken', 'File', 'Plot'].map((head) => (
                <th key={head} scope="col" className="px-3 py-1.5 font-semibold">
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody className="max-md:block">
            {samples.map((sample, at) => (
              <SampleRow
                key={sample.id}
                sample={sample}
                at={at}
                plotName={sample.plotId === null ? null : (names.get(sample.plotId) ?? 'an archived plot')}
                proposedName={sample.proposal === null ? null : (names.get(sample.proposal.plotId) ?? null)}
                selected={rows.selected.has(sample.id)}
                tabStop={at === rows.active}
                onToggle={rows.toggle}
              />
            ))}
          </tbody>
        </table>
      </div>
    </div>
  );
}
