'use client';

import { useMemo, useState } from 'react';
import { ComposedChart, Line, Tooltip, XAxis, YAxis } from 'recharts';
import { driftLayout, type LayoutInput } from './drift-layout';
import { DriftMarks } from './drift-marks';
import { DriftTip } from './drift-tip';
import { dayMs } from './numbers';
import { INK } from './palette';
import { sortPoints } from './series';

interface DriftPlotProps extends LayoutInput {
  readonly title: string;
}

/**
 * The interactive chart. The library carries the pointer, the arrow keys and the tooltip; what is seen is drawn by
 * DriftMarks from the same layout that the exported picture uses, so its own axes and lines stay invisible.
 */
export default function DriftPlot({ title, ...input }: DriftPlotProps) {
  const layout = driftLayout(input);
  const rows = useMemo(
    () => sortPoints(input.points).map((point) => ({ at: dayMs(point.takenOn), value: point.value, point })),
    [input.points],
  );
  const [dismissed, setDismissed] = useState(false);
  const { plot } = layout;
  const wake = () => setDismissed(false);
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: the chart inside is the focusable element; this only hears its keys
    <div
      onKeyDown={(event) => (event.key === 'Escape' ? setDismissed(true) : wake())}
      onMouseMove={wake}
      className="[&_svg]:overflow-visible"
    >
      <ComposedChart
        width={input.width}
        height={input.height}
        data={rows}
        margin={{ top: plot.top, left: plot.left, right: input.width - plot.right, bottom: input.height - plot.bottom }}
        title={`${title}. Left and right arrow keys step through the tests.`}
        accessibilityLayer
      >
        <XAxis dataKey="at" type="number" scale="time" domain={[...layout.timeDomain]} allowDataOverflow hide />
        <YAxis type="number" domain={[...layout.valueDomain]} allowDataOverflow hide width={0} />
        <DriftMarks layout={layout} analyte={input.analyte} band={input.band} />
        <Line
          dataKey="value"
          stroke="none"
          // A lone test would get a dot of the library's own; DriftMarks has drawn it already.
          dot={() => null}
          activeDot={dismissed ? false : { r: 9, fill: 'none', stroke: INK.gley, strokeWidth: 2 }}
          isAnimationActive={false}
          legendType="none"
        />
        <Tooltip
          isAnimationActive={false}
          cursor={dismissed ? false : { stroke: INK.gley, strokeOpacity: 0.4 }}
          wrapperStyle={{ pointerEvents: 'auto', zIndex: 10 }}
          content={({ active, payload }) => {
            const row: unknown = payload?.[0]?.payload;
            const point = rows.find((r) => r === row)?.point;
            if (!active || dismissed || point === undefined) return null;
            return (
              <DriftTip point={point} analyte={input.analyte} {...(input.locale ? { locale: input.locale } : {})} />
            );
          }}
        />
      </ComposedChart>
    </div>
  );
}
