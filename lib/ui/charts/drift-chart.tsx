'use client';

import { lazy, Suspense, useId, useRef, useState } from 'react';
import { Button } from '../actions/button';
import { cx } from '../cx';
import { driftCsv, driftRows } from './csv';
import { DriftKey } from './drift-key';
import { driftLayout } from './drift-layout';
import { DriftPicture } from './drift-picture';
import { DriftTable } from './drift-table';
import { driftFinding } from './finding';
import { formatDay } from './numbers';
import { saveBlob, svgToPng } from './save-file';
import { ShowNumbers } from './show-numbers';
import type { DriftChartProps } from './types';
import { useWidth } from './use-width';

// The chart library is heavy: it comes after the page, into a box whose height is already kept.
const DriftPlot = lazy(() => import('./drift-plot'));

const PICTURE_FAILED =
  'The picture could not be made in this browser. The chart is unchanged; the CSV holds the same numbers.';

/** One analyte of one plot over true time, with its text, table, CSV and picture. */
export function DriftChart(props: DriftChartProps) {
  const { title, analyte, points, amendments, band, asOf, source, fileName, hideFinding = false, locale } = props;
  const { box, width } = useWidth<HTMLDivElement>();
  const picture = useRef<SVGSVGElement>(null);
  const [failure, setFailure] = useState('');
  const findingId = useId();
  const worded = locale === undefined ? {} : { locale };
  const finding = props.finding ?? driftFinding({ analyte, points, band, ...worded });
  const rows = driftRows(points, amendments);
  const height = width > 0 && width < 520 ? 300 : 340;
  const drawing = { analyte, points, amendments, band, asOf, ...worded };
  const flags = width > 0 && driftLayout({ ...drawing, width, height }).flags;

  const drawn = width > 0 && rows.length > 0;

  const saveCsv = () =>
    saveBlob(new Blob([`\uFEFF${driftCsv(rows, analyte)}`], { type: 'text/csv;charset=utf-8' }), `${fileName}.csv`);
  const savePicture = async () => {
    setFailure('');
    const answer = picture.current === null ? null : await svgToPng(picture.current);
    if (answer?.ok) saveBlob(answer.blob, `${fileName}.png`);
    else setFailure(PICTURE_FAILED);
  };

  return (
    <figure
      className="@container grid min-w-0 grid-cols-[minmax(0,1fr)] gap-3 print:block"
      aria-labelledby={findingId}
      data-runs-on
    >
      <p
        id={findingId}
        className={hideFinding ? 'sr-only' : cx('max-w-measure text-lg leading-snug', drawn && 'print:hidden')}
      >
        {finding}
      </p>
      <div ref={box} className={cx('h-[340px] min-w-0 @max-[520px]:h-[300px]', drawn && 'print:hidden')}>
        {points.length === 0 && amendments.length === 0 ? (
          <EmptyPlot />
        ) : (
          width > 0 && (
            <Suspense fallback={<Skeleton />}>
              <DriftPlot title={title} {...drawing} width={width} height={height} />
            </Suspense>
          )
        )}
        {width === 0 && points.length > 0 && <Skeleton />}
      </div>
      <div className={drawn ? 'print:hidden' : ''}>
        <DriftKey points={points} amendments={amendments} flags={flags} {...worded} />
      </div>
      <figcaption className={cx('text-sm text-clay', drawn && 'print:hidden')}>
        {title}, drawn {formatDay(asOf, locale)}.{band !== null && ` Target band ${band.label}: ${band.source}.`}{' '}
        {source}.
      </figcaption>
      {drawn && (
        // On paper the picture stands in for the chart, whose width is that of the screen.
        <div className="hidden break-inside-avoid print:block [&>svg]:h-auto [&>svg]:w-full">
          <DriftPicture
            ref={picture}
            title={title}
            finding={finding}
            drawnOn={`Drawn ${formatDay(asOf, locale)}`}
            source={source}
            fontFamily="'Atkinson Hyperlegible Next', 'Liberation Sans', Arial, sans-serif"
            {...drawing}
          />
        </div>
      )}
      {rows.length > 0 && (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-2">
          <ShowNumbers>
            <DriftTable title={title} rows={rows} analyte={analyte} {...worded} />
          </ShowNumbers>
          <div className="flex flex-wrap gap-3 print:hidden">
            <Button look="quiet" size="small" onClick={saveCsv}>
              Download CSV
            </Button>
            <Button look="quiet" size="small" onClick={savePicture}>
              Save picture
            </Button>
          </div>
          <p role="status" className="text-sm text-iron empty:hidden">
            {failure}
          </p>
        </div>
      )}
    </figure>
  );
}

/** The shape of what will come, while the chart is on its way. */
function Skeleton() {
  return (
    <svg width="100%" height="100%" aria-hidden="true">
      <rect x="46" y="30%" width="82%" height="26%" fill="currentColor" className="text-gley-wash" />
      <line x1="46" x2="88%" y1="84%" y2="84%" stroke="currentColor" strokeWidth="2" className="text-gley" />
    </svg>
  );
}

function EmptyPlot() {
  return (
    <div className="relative h-full">
      <Skeleton />
      <p className="absolute inset-x-12 top-[36%] text-center text-clay">No test to draw yet</p>
    </div>
  );
}
