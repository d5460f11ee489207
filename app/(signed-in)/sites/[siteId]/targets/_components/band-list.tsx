import { analyteLabel, bandText, methodText } from './band-words';

type Band = {
  readonly analyte: string;
  readonly low: string | null;
  readonly high: string | null;
  readonly unit: string | null;
  readonly method: string | null;
};

export function BandList({ bands }: { bands: readonly Band[] }) {
  return (
    <dl className="grid">
      {bands.map((band) => (
        <div
          key={band.analyte}
          className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-6 border-b border-horizon-5 py-1.5 sm:grid-cols-[14rem_12rem_1fr]"
        >
          <dt>{analyteLabel(band.analyte)}</dt>
          <dd className="font-figures font-semibold">{bandText(band)}</dd>
          <dd className="text-sm text-clay max-sm:col-span-2">{methodText(band)}</dd>
        </div>
      ))}
    </dl>
  );
}
