import type { ReactNode } from 'react';
import { CompareStrip } from '@/lib/ui/charts/compare-strip';
import { DriftChart } from '@/lib/ui/charts/drift-chart';
import { Dumbbell } from '@/lib/ui/charts/dumbbell';
import { IntervalStrip } from '@/lib/ui/charts/interval-strip';
import {
  boron,
  boronBand,
  boronHistory,
  manyAmendments,
  ph,
  phBand,
  phBroken,
  phHistory,
  potassium,
  ppmHistory,
  sulfur,
} from '@/lib/ui/charts/sample-data';
import { SmallMultiples } from '@/lib/ui/charts/small-multiples';

const AS_OF = '2026-06-01';
const common = {
  title: 'pH, North bed',
  analyte: ph,
  band: phBand,
  amendments: sulfur,
  asOf: AS_OF,
  source: 'Tern Lane Growers, confirmed laboratory results',
  fileName: 'north-bed-ph',
};
const fall = { analyte: ph, planned: -0.5, half: -0.25, oneAndHalf: -0.75 };

export function ChartsSection() {
  return (
    <div className="grid gap-12">
      <Case name="Five tests, two amendments">
        <DriftChart {...common} points={phHistory} />
      </Case>
      <Case name="A break, many amendments">
        <DriftChart {...common} points={phBroken} amendments={manyAmendments} />
      </Case>
      <div className="grid gap-12 lg:grid-cols-2">
        <Case name="Below what the laboratory can read">
          <DriftChart
            {...common}
            title="Boron, North bed"
            analyte={boron}
            points={boronHistory}
            band={boronBand}
            amendments={[]}
            fileName="north-bed-boron"
          />
        </Case>
        <Case name="Three tests">
          <DriftChart {...common} points={phHistory.slice(0, 3)} amendments={[]} asOf="2024-06-01" />
        </Case>
        <Case name="Two tests">
          <DriftChart {...common} points={phHistory.slice(0, 2)} amendments={[]} asOf="2023-06-01" />
        </Case>
        <Case name="One test">
          <DriftChart {...common} points={phHistory.slice(0, 1)} amendments={[]} asOf="2022-06-01" />
        </Case>
        <Case name="No test">
          <DriftChart {...common} points={[]} amendments={[]} />
        </Case>
      </div>
      <Case name="Every analyte, same width and order">
        <SmallMultiples
          title="Every analyte of North bed"
          from="2022-01-01"
          asOf={AS_OF}
          amendments={sulfur}
          series={[
            { analyte: ph, points: phHistory, band: phBand, href: '#charts' },
            { analyte: potassium, points: ppmHistory('k', [142, 155, 171, 186, 214]), band: null },
            { analyte: boron, points: boronHistory, band: boronBand },
            {
              analyte: { ...potassium, label: 'Calcium' },
              points: ppmHistory('ca', [2410, 2380, 2290, 2310, 2180]),
              band: null,
            },
            { analyte: { ...potassium, label: 'Magnesium' }, points: [], band: null },
          ]}
        />
      </Case>
      <div className="grid gap-12 lg:grid-cols-2">
        <Case name="Effect: as intended, with controls">
          <IntervalStrip
            {...fall}
            change={{ estimate: -0.46, low: -0.6, high: -0.32 }}
            comparedWith="compared with 2 untreated plots"
          />
        </Case>
        <Case name="Effect: cannot tell yet">
          <IntervalStrip {...fall} change={{ estimate: -0.21, low: -0.58, high: 0.16 }} />
        </Case>
        <Case name="Effect: open side">
          <IntervalStrip
            analyte={potassium}
            planned={-40}
            half={-20}
            oneAndHalf={null}
            change={{ estimate: -52, low: null, high: -11 }}
          />
        </Case>
        <Case name="Before and after">
          <Dumbbell
            analyte={ph}
            before={{ takenOn: '2025-04-11', value: 6.9, printed: '6.9', low: 6.64, high: 7.16 }}
            after={{ takenOn: '2026-04-14', value: 6.4, printed: '6.4', low: 6.14, high: 6.66 }}
            intended={{ low: 6.15, high: 6.65 }}
            changeIsClear
          />
        </Case>
        <Case name="Compare two tests">
          <CompareStrip
            analyte={ph}
            earlier={{ label: 'Fall 2025', takenOn: '2025-10-02', value: 6.9, printed: '6.9', low: 6.64, high: 7.16 }}
            later={{ label: 'Spring 2026', takenOn: '2026-04-14', value: 6.6, printed: '6.6', low: 6.34, high: 6.86 }}
            outcome={{
              kind: 'difference',
              difference: { estimate: -0.3, low: -0.66, high: 0.06 },
              moreThanNoise: false,
              widenedBy: ['another season'],
            }}
          />
        </Case>
        <Case name="Compare refused">
          <CompareStrip
            analyte={{ ...potassium, label: 'Phosphorus' }}
            earlier={{ label: 'Spring 2025', takenOn: '2025-04-11', value: 62, printed: '62', low: 48, high: 79 }}
            later={{ label: 'Spring 2026', takenOn: '2026-04-14', value: 41, printed: '41', low: 32, high: 53 }}
            outcome={{
              kind: 'refused',
              reason: 'one was extracted by Mehlich-3, the other by Bray P1. Each is fine by itself.',
            }}
          />
        </Case>
      </div>
    </div>
  );
}

function Case({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="grid min-w-0 content-start gap-3">
      <h3 className="text-sm text-clay">{name}</h3>
      {children}
    </div>
  );
}
