'use client';

import { useState } from 'react';
import { Button } from '../actions/button';
import { outlineOf } from './geometry';
import { SitePlan } from './site-plan';
import type { LengthUnit, PlanPlot } from './types';

const PLOTS: readonly PlanPlot[] = [
  {
    id: 'north',
    name: 'North bed',
    outline: outlineOf({ x: 1, y: 9, width: 12, height: 5 }),
    lastTest: { date: '2026-05-03', ph: '6.3' },
    crop: 'Exhibition onion',
    uploads: [{ fileName: 'spring.pdf', text: '3 of 12 MB', share: 0.25 }],
  },
  {
    id: 'marrow',
    name: 'Marrow strip',
    outline: outlineOf({ x: 15, y: 2, width: 3, height: 12 }),
    lastTest: { date: '2025-10-11', ph: '7.1' },
    crop: 'Marrow',
  },
  {
    id: 'corner',
    name: 'Corner',
    outline: [
      { x: 1, y: 1 },
      { x: 12, y: 1 },
      { x: 12, y: 4 },
      { x: 6, y: 4 },
      { x: 6, y: 7 },
      { x: 1, y: 7 },
    ],
    crop: 'Leek',
  },
  {
    id: 'far',
    name: 'Field over the lane',
    outline: null,
    typedAreaM2: 400,
    lastTest: { date: '2026-04-20', ph: null },
  },
];

/** The plan with plots, for a viewer, and empty; changes stay on this page. */
export function SitePlanGallery() {
  const [plots, setPlots] = useState(PLOTS);
  const [selected, setSelected] = useState<string | null>(null);
  const [unit, setUnit] = useState<LengthUnit>('ft');
  const [said, setSaid] = useState('');
  return (
    <div className="grid gap-8">
      <div className="grid gap-2">
        <h3 className="text-lg">For an owner</h3>
        <div>
          <Button look="quiet" size="small" onClick={() => setUnit(unit === 'ft' ? 'm' : 'ft')}>
            Show {unit === 'ft' ? 'metres' : 'feet'}
          </Button>
        </div>
        <SitePlan
          siteName="Mill Lane"
          plots={plots}
          unit={unit}
          northDegrees={-30}
          selectedPlotId={selected}
          onSelect={setSelected}
          plotHref={(id) => `#${id}`}
          onOpen={(id) => setSaid(`Would open ${id}.`)}
          canEdit
          canUpload
          onChangeOutline={async (id, outline) =>
            setPlots((now) => now.map((plot) => (plot.id === id ? { ...plot, outline } : plot)))
          }
          onCreate={(outline) =>
            setPlots((now) => [...now, { id: `new${now.length}`, name: `New plot ${now.length}`, outline }])
          }
          onDropFiles={(id, files) => setSaid(`Would send ${files.map((file) => file.name).join(', ')} to ${id}.`)}
        />
        <p role="status" className="text-sm text-clay">
          {said}
        </p>
      </div>
      <div className="grid gap-2">
        <h3 className="text-lg">For a viewer, nothing drawn yet</h3>
        <SitePlan
          siteName="Church Field"
          plots={[]}
          unit="m"
          selectedPlotId={null}
          onSelect={() => {}}
          plotHref={(id) => `#${id}`}
          canEdit={false}
          canUpload={false}
        />
      </div>
    </div>
  );
}
