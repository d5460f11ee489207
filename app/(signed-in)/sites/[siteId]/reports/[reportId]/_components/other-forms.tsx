'use client';

import { analyte, isAnalyteKey } from '@/lib/domain/analytes';
import type { OtherForm, ReviewSample } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import { Notice } from '@/lib/ui/feedback/notice';
import { counted, onDay } from './report-words';
import type { SampleSaves } from './use-sample-saves';

type OtherFormsProps = {
  sample: ReviewSample;
  name: string;
  saves: SampleSaves;
  separate: boolean;
  onSeparate: (on: boolean) => void;
};

const STATE: Readonly<Record<string, string>> = { confirmed: 'already confirmed', 'in-review': 'also in review' };

/** The same analysis as a page and as a data file counts once: what looks like it, cell by cell, and the choice. */
export function OtherForms({ sample, name, saves, separate, onSeparate }: OtherFormsProps) {
  const { sameAs, candidates } = sample;
  if (sameAs) {
    return (
      <Notice
        title="Counts once"
        action={
          <Button
            look="quiet"
            size="small"
            className="min-h-(--target)!"
            busy={saves.busy}
            onClick={() => void saves.setSameAs(null)}
          >
            It is an analysis of its own<span className="sr-only">, {name}</span>
          </Button>
        }
      >
        {name} is the same analysis as {wordsFor(sameAs)}. Its values are compared and add no results of their own.
        <Compared form={sameAs} />
      </Notice>
    );
  }
  return candidates.map((form) => (
    <Notice
      key={form.reportSampleId}
      tone={separate ? 'info' : 'look'}
      title={separate ? 'Counts as a second analysis' : 'This may be the same analysis in another form'}
      action={
        separate ? (
          <Button look="quiet" size="small" className="min-h-(--target)!" onClick={() => onSeparate(false)}>
            Ask me again<span className="sr-only"> about {name}</span>
          </Button>
        ) : (
          <>
            <Button
              size="small"
              className="min-h-(--target)!"
              busy={saves.busy}
              onClick={() => void saves.setSameAs(form.reportSampleId)}
            >
              The same: count it once<span className="sr-only">, {name}</span>
            </Button>
            <Button look="quiet" size="small" className="min-h-(--target)!" onClick={() => onSeparate(true)}>
              A second analysis of the same bag<span className="sr-only">, {name}</span>
            </Button>
          </>
        )
      }
    >
      {name} looks like {wordsFor(form)}.
      <Compared form={form} />
    </Notice>
  ));
}

function wordsFor(form: OtherForm): string {
  const what = [form.printedName, form.labNumber].filter(Boolean).join(', ');
  const day = form.takenOn ? `, taken ${onDay(form.takenOn)}` : '';
  const state = STATE[form.reportState] ? ` (${STATE[form.reportState]})` : '';
  return `${what || 'a sample'}${day} in ${form.fileName ?? 'a report typed in by hand'}${state}`;
}

function Compared({ form }: { form: OtherForm }) {
  const said = `${form.equal} of ${counted(form.shared, 'shared value')} are equal.`;
  if (form.differences.length === 0) return <span className="block">{said} Nothing differs.</span>;
  return (
    <details className="mt-1">
      <summary className="text-link inline-flex min-h-9 items-center">
        {said} Show {counted(form.differences.length, 'difference')}
      </summary>
      <table className="mt-1 w-full max-w-xl border-collapse text-sm">
        <caption className="sr-only">Where the two forms differ</caption>
        <thead>
          <tr className="border-b border-humus text-left">
            <th scope="col" className="py-1 pr-3">
              Analyte
            </th>
            <th scope="col" className="px-3 text-right">
              Here
            </th>
            <th scope="col" className="pl-3 text-right">
              There
            </th>
          </tr>
        </thead>
        <tbody>
          {form.differences.map((one) => (
            <tr key={`${one.analyte} ${one.unit} ${one.rowId}`} className="border-b border-horizon-5">
              <th scope="row" className="py-1 pr-3 text-left font-normal">
                {isAnalyteKey(one.analyte) ? analyte(one.analyte).label : one.analyte}
                {one.unit ? `, ${one.unit}` : ''}
                {one.repeats ? (
                  <span className="block text-clay">
                    {one.repeats === 'here' ? 'This report' : 'The other one'} repeats the sample above it here.
                  </span>
                ) : null}
              </th>
              <td className="px-3 text-right font-figures">{one.here ?? 'not there'}</td>
              <td className="pl-3 text-right font-figures">{one.there ?? 'not there'}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </details>
  );
}
