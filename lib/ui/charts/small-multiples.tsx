'use client';

import { driftFinding } from './finding';
import { dayMs, formatDay, withUnit } from './numbers';
import { INK } from './palette';
import { share, valueAxis } from './scale';
import { joinedPairs, splitSeries } from './series';
import { LimitMark, Mark } from './shapes';
import type { MiniSeries, SmallMultiplesProps } from './types';

const HEIGHT = 92;
const TOP = 12;
const BOTTOM = 72;
/** Share of the width, in percent, kept free at the right for the last dot. */
const LEFT = 3;
const RIGHT = 94;

const pct = (value: number): string => `${Number(value.toFixed(3))}%`;

/** One small chart an analyte: same width, same time axis, same order every year; each has its own value scale. */
export function SmallMultiples({ title, series, amendments, from, asOf, locale }: SmallMultiplesProps) {
  return (
    <section aria-label={title}>
      <ul className="grid grid-cols-[repeat(auto-fill,minmax(15rem,1fr))] gap-x-6 gap-y-5">
        {series.map((mini) => (
          <li key={mini.analyte.label} className="min-w-0 break-inside-avoid border-t border-fallow pt-2">
            <MiniChart mini={mini} amendments={amendments} from={from} asOf={asOf} {...(locale ? { locale } : {})} />
          </li>
        ))}
      </ul>
    </section>
  );
}

type MiniProps = Omit<SmallMultiplesProps, 'title' | 'series'> & { readonly mini: MiniSeries };

function MiniChart({ mini, amendments, from, asOf, locale }: MiniProps) {
  const { analyte, points, band, href } = mini;
  const segments = splitSeries(points);
  const last = segments.at(-1)?.points.at(-1);
  const finding = driftFinding({ analyte, points, band, ...(locale ? { locale } : {}) });
  const heading = withUnit(analyte.label, analyte.unit === '' ? '' : `(${analyte.unit})`);
  return (
    <figure className="grid gap-1">
      <div className="flex items-baseline justify-between gap-3">
        <p className="min-w-0 text-sm font-bold">
          {href === undefined ? (
            heading
          ) : (
            <a href={href} className="text-link">
              {heading}
            </a>
          )}
        </p>
        <p className="font-figures text-base font-bold text-gley">{last?.printed ?? '–'}</p>
      </div>
      <MiniDrawing mini={mini} amendments={amendments} from={from} asOf={asOf} />
      <div className="flex justify-between text-xs text-clay" aria-hidden="true">
        <span>{from.slice(0, 4)}</span>
        {band !== null && <span>target {band.label}</span>}
        <span>{asOf.slice(0, 4)}</span>
      </div>
      <figcaption className="sr-only">
        {finding}
        {amendments.length > 0 &&
          ` Spread: ${amendments.map((a) => `${a.label} on ${formatDay(a.on, locale)}`).join('; ')}.`}
      </figcaption>
    </figure>
  );
}

function MiniDrawing({ mini, amendments, from, asOf }: MiniProps) {
  const { analyte, points, band } = mini;
  const axis = valueAxis(points, band, analyte, 3);
  const fromMs = dayMs(from);
  const toMs = dayMs(asOf);
  const x = (day: string): number => LEFT + Math.min(1, Math.max(0, share(dayMs(day), fromMs, toMs))) * (RIGHT - LEFT);
  const y = (value: number): number => BOTTOM - share(value, axis.min, axis.max) * (BOTTOM - TOP);
  const segments = splitSeries(points);
  const bandTop = band === null ? 0 : y(band.high ?? axis.max);
  const bandBottom = band === null ? 0 : y(band.low ?? axis.min);
  return (
    <svg width="100%" height={HEIGHT} aria-hidden="true" overflow="visible">
      {band !== null && (
        <g>
          <rect x="0" width="100%" y={bandTop} height={Math.max(1, bandBottom - bandTop)} fill={INK.gleyWash} />
          {[band.high === null ? null : bandTop, band.low === null ? null : bandBottom].map((at) =>
            at === null ? null : (
              <line
                key={at}
                x1="0"
                x2="100%"
                y1={at}
                y2={at}
                stroke={INK.gley}
                strokeWidth="1.5"
                strokeDasharray="1 4"
                strokeLinecap="round"
              />
            ),
          )}
        </g>
      )}
      {amendments.map((a) => (
        <g key={a.id}>
          <line
            x1={pct(x(a.on))}
            x2={pct(x(a.on))}
            y1={TOP - 6}
            y2={BOTTOM + 6}
            stroke={INK.redHorizon}
            strokeDasharray="4 3"
          />
          <svg x={pct(x(a.on))} y={BOTTOM + 9} overflow="visible" aria-hidden="true">
            <path d="M0 0l4 7h-8z" fill={INK.redHorizon} />
          </svg>
        </g>
      ))}
      <line x1="0" x2="100%" y1={BOTTOM + 6} y2={BOTTOM + 6} stroke={INK.gley} strokeWidth="2" />
      {segments.map((segment) =>
        joinedPairs(segment).map(([a, b]) => (
          <line
            key={a.id}
            x1={pct(x(a.takenOn))}
            y1={y(a.value)}
            x2={pct(x(b.takenOn))}
            y2={y(b.value)}
            stroke={segment.style.colour}
            strokeWidth="2"
            strokeDasharray={segment.style.dash}
          />
        )),
      )}
      {segments.map((segment) =>
        segment.points.map((point) => (
          <svg
            key={point.id}
            x={pct(x(point.takenOn))}
            y={point.qualifier === 'below-unknown' ? BOTTOM - 2 : y(point.value)}
            overflow="visible"
            aria-hidden="true"
          >
            {point.qualifier === 'exact' ? (
              <Mark x={0} y={0} colour={segment.style.colour} shape={segment.style.marker} size={4} />
            ) : (
              <LimitMark
                x={0}
                y={0}
                colour={segment.style.colour}
                side={point.qualifier === 'above' ? 'above' : 'below'}
              />
            )}
          </svg>
        )),
      )}
    </svg>
  );
}
