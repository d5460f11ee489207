import type { EffectCheckAnswer } from '@/lib/schemas/effects';
import { formatDay } from '@/lib/ui/charts/numbers';
import type { ChartAnalyte } from '@/lib/ui/charts/types';
import { DataTable } from '@/lib/ui/show/data-table';
import { DefinitionList } from '@/lib/ui/show/definition-list';
import { type Judged, printedTest } from './effect-props';
import { COMPONENT_WORDS, controlWords, learntWords, noiseSize, whyFacts } from './why-facts';

type WhyProps = { check: EffectCheckAnswer; outcome: Judged; analyte: ChartAnalyte };

/** Everything that went into a verdict. */
export function Why({ check, outcome, analyte }: WhyProps) {
  const { reading, after } = outcome;
  const tests = [
    ...outcome.before.map((row) => ({
      id: row.test.resultId as string,
      word: 'earlier',
      day: row.test.day as string,
      printed: printedTest(row.test, check.decimals),
      weight: `${Math.round(100 * row.weight)} %`,
      like: [
        row.sameSeason ? 'same season' : 'another season',
        row.sameLaboratory ? 'same laboratory' : 'another laboratory',
      ].join(', '),
    })),
    {
      id: after.resultId as string,
      word: 'later',
      day: after.day as string,
      printed: printedTest(after, check.decimals),
      weight: '',
      like: outcome.secondLook ? 'chosen by hand: a second look' : 'the test that was to judge',
    },
  ];
  return (
    <div className="grid gap-7">
      <DataTable
        caption="Tests used"
        rows={tests}
        rowKey={(row) => `${row.word} ${row.id}`}
        columns={[
          { key: 'day', head: 'Day', rowHead: true, cell: (row) => `${formatDay(row.day)}, ${row.word}` },
          { key: 'value', head: analyte.label, numeric: true, cell: (row) => row.printed },
          { key: 'weight', head: 'Weight', numeric: true, cell: (row) => row.weight },
          { key: 'like', head: 'Beside the later test', cell: (row) => row.like },
        ]}
      />
      <DefinitionList items={whyFacts(outcome, analyte)} />
      <DataTable
        caption="Untreated plots"
        rows={outcome.controls}
        rowKey={(row) => row.plotId}
        empty="No other plot of this site was tested, so nothing stands beside it."
        columns={[
          { key: 'name', head: 'Plot', rowHead: true, cell: (row) => row.name },
          { key: 'use', head: 'Used or not', cell: controlWords },
        ]}
      />
      <DataTable
        caption="Where the noise comes from"
        rows={reading.components}
        rowKey={(row) => row.key}
        columns={[
          { key: 'what', head: 'What', rowHead: true, cell: (row) => COMPONENT_WORDS[row.key] },
          { key: 'size', head: 'Size', numeric: true, cell: (row) => noiseSize(row, reading, analyte) },
          { key: 'learnt', head: 'Known from', cell: learntWords },
        ]}
      />
      <Earlier check={check} />
      <p className="text-sm text-clay">Rule {outcome.ruleVersion}. Intervals are 90 %: 5 % on each side.</p>
    </div>
  );
}

/** What stood here before, when data or the rule changed it. */
export function Earlier({ check }: { check: EffectCheckAnswer }) {
  if (check.earlier.length === 0) return null;
  return (
    <div>
      <h3 className="text-lg">What stood here before</h3>
      <ul className="mt-2 grid gap-1">
        {check.earlier.map((one) => (
          <li key={one.computedAt}>
            {formatDay(one.computedAt)}: {one.verdict}
          </li>
        ))}
      </ul>
    </div>
  );
}
