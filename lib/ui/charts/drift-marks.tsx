import { axisTitle, type DriftLayout } from './drift-layout';
import { INK } from './palette';
import { LimitMark, Mark } from './shapes';
import type { ChartAnalyte, TargetBand } from './types';

interface DriftMarksProps {
  readonly layout: DriftLayout;
  readonly analyte: ChartAnalyte;
  readonly band: TargetBand | null;
}

const SMALL = 13;

/** Everything that is seen of a drift chart. The interactive chart lays its cursor and tooltip over it. */
export function DriftMarks({ layout, analyte, band }: DriftMarksProps) {
  return (
    // biome-ignore lint/a11y/noAriaHiddenOnFocusable: a group of shapes takes no focus; the text beside the chart says it all
    <g fontSize={SMALL} aria-hidden="true">
      <Ground layout={layout} analyte={analyte} band={band} />
      <Amendments layout={layout} />
      <Datum layout={layout} />
      <Breaks layout={layout} />
      <Tests layout={layout} />
    </g>
  );
}

function Ground({ layout, analyte, band }: DriftMarksProps) {
  const { plot } = layout;
  return (
    <g>
      {layout.band !== null && (
        <g>
          <rect
            x={plot.left}
            y={layout.band.top}
            width={plot.right - plot.left}
            height={Math.max(1, layout.band.bottom - layout.band.top)}
            fill={INK.gleyWash}
          />
          {[layout.band.hasTop ? layout.band.top : null, layout.band.hasBottom ? layout.band.bottom : null].map((y) =>
            y === null ? null : (
              <line
                key={y}
                x1={plot.left}
                x2={plot.right}
                y1={y}
                y2={y}
                stroke={INK.gley}
                strokeDasharray="1 4"
                strokeWidth={2}
                strokeLinecap="round"
              />
            ),
          )}
        </g>
      )}
      {layout.yTicks.map(({ y, label }) => (
        <g key={label}>
          <line x1={plot.left - 4} x2={plot.right} y1={y} y2={y} stroke={INK.fallow} strokeOpacity={0.28} />
          <text x={plot.left - 8} y={y + 4} textAnchor="end" fill={INK.clay}>
            {label}
          </text>
        </g>
      ))}
      {layout.band !== null && band !== null && (
        <text
          x={plot.left + 6}
          y={Math.min(layout.band.bottom - 6, plot.bottom - 6)}
          fill={INK.gley}
          stroke={INK.gleyWash}
          strokeWidth={3}
          paintOrder="stroke"
        >
          target {band.label}
        </text>
      )}
      <text x={4} y={12} fill={INK.clay} fontWeight={600}>
        {axisTitle(analyte)}
      </text>
      {layout.xTicks.map(({ x, label }) => (
        <g key={label}>
          <line x1={x} x2={x} y1={plot.bottom} y2={layout.xTickY - SMALL} stroke={INK.fallow} strokeOpacity={0.5} />
          <text x={x} y={layout.xTickY} textAnchor="middle" fill={INK.clay}>
            {label}
          </text>
        </g>
      ))}
    </g>
  );
}

function Amendments({ layout }: { layout: DriftLayout }) {
  const { plot } = layout;
  return (
    <g>
      {layout.amendments.map(({ amendment, x, text, textX, anchor, row }) => {
        const textY = plot.bottom + 29 + row * 18;
        return (
          <g key={amendment.id}>
            <line
              x1={x}
              x2={x}
              y1={plot.top}
              y2={plot.bottom}
              stroke={INK.redHorizon}
              strokeWidth={1.5}
              strokeDasharray="5 4"
            />
            <path d={`M${x} ${plot.bottom + 7}l6 9h-12z`} fill={INK.redHorizon} />
            {layout.flags ? (
              <g>
                <rect x={x - 8} y={textY - 11} width={16} height={15} rx={2} fill={INK.chalk} stroke={INK.redHorizon} />
                <text x={x} y={textY + 1} textAnchor="middle" fill={INK.redHorizon} fontWeight={600}>
                  {text}
                </text>
              </g>
            ) : (
              <text
                x={textX}
                y={textY}
                textAnchor={anchor}
                fill={INK.redHorizon}
                stroke={INK.chalk}
                strokeWidth={4}
                paintOrder="stroke"
              >
                {text}
              </text>
            )}
          </g>
        );
      })}
    </g>
  );
}

function Datum({ layout }: { layout: DriftLayout }) {
  const { last } = layout;
  return (
    <g>
      <path d={layout.datum} fill="none" stroke={INK.gley} strokeWidth={2} strokeLinecap="round" />
      {last !== null && (
        <g>
          <circle
            cx={last.x}
            cy={last.y}
            r={5}
            fill={last.known ? INK.gley : INK.chalk}
            stroke={INK.gley}
            strokeWidth={2}
          />
          <text x={last.x + 9} y={last.y + 5} fill={INK.gley} fontSize={15} fontWeight={700}>
            {last.label}
          </text>
        </g>
      )}
    </g>
  );
}

function Breaks({ layout }: { layout: DriftLayout }) {
  const [only, ...more] = layout.breaks;
  // One break has room for its reason; several are told in the list below the chart.
  const words = only !== undefined && more.length === 0 && layout.plot.right - only.x > (only.reason.length + 12) * 7.5;
  return (
    <g stroke={INK.humus} strokeWidth={1.5}>
      {layout.breaks.map(({ x, reason }) => (
        <g key={x}>
          <line x1={x} x2={x} y1={layout.plot.top} y2={layout.plot.bottom} stroke={INK.fallow} strokeDasharray="1 5" />
          <path d={`M${x - 5} ${layout.plot.top + 6}l5 -12M${x} ${layout.plot.top + 6}l5 -12`} fill="none" />
          {words && (
            <text x={x + 12} y={layout.plot.top - 6} fill={INK.clay} stroke="none">
              {reason}, not joined
            </text>
          )}
        </g>
      ))}
    </g>
  );
}

function Tests({ layout }: { layout: DriftLayout }) {
  return (
    <g>
      {layout.lines.map(({ segment, x1, y1, x2, y2 }) => (
        <line
          key={`${x1} ${y1} ${x2}`}
          x1={x1}
          y1={y1}
          x2={x2}
          y2={y2}
          stroke={segment.style.colour}
          strokeWidth={2}
          strokeDasharray={segment.style.dash}
        />
      ))}
      {layout.points.map(({ point, segment, x, whisker }) =>
        whisker === null ? null : (
          <path
            key={point.id}
            d={`M${x} ${whisker.top}V${whisker.bottom}M${x - 4} ${whisker.top}h8M${x - 4} ${whisker.bottom}h8`}
            stroke={segment.style.colour}
            strokeWidth={1.5}
            strokeOpacity={0.75}
            fill="none"
          />
        ),
      )}
      {layout.points.map(({ point, segment, x, y }) =>
        point.qualifier === 'exact' ? (
          <Mark key={point.id} x={x} y={y} colour={segment.style.colour} shape={segment.style.marker} />
        ) : (
          <g key={point.id}>
            <LimitMark
              x={x}
              y={y}
              colour={segment.style.colour}
              side={point.qualifier === 'above' ? 'above' : 'below'}
            />
            <text
              x={x}
              y={y - 9}
              textAnchor="middle"
              fill={segment.style.colour}
              stroke={INK.chalk}
              strokeWidth={3}
              paintOrder="stroke"
            >
              {point.printed}
            </text>
          </g>
        ),
      )}
    </g>
  );
}
