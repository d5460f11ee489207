import type { AnalyteKey } from '../analytes';
import type { ReactionKind } from '../effects/types';
import type { FigureStatus, Source } from '../sources';

export type AnalysisKey = 'N' | 'P2O5' | 'K2O' | 'S' | 'Ca' | 'Mg' | 'B' | 'CCE';

/** Per cent by weight; CCE is the calcium carbonate equivalent in per cent. */
export type Figure = {
  readonly percent: number;
  readonly status: FigureStatus;
  readonly range?: readonly [number, number];
};

export type Caution = { readonly text: string; readonly source: string };

export type Material = {
  readonly key: string;
  readonly name: string;
  readonly kind: 'lowers-ph' | 'raises-ph' | 'mineral' | 'organic';
  /** How it acts with time; null when it is not known to change a test by itself. */
  readonly reaction: ReactionKind | null;
  /** Analytes it acts on, whatever it was meant for. */
  readonly affects: readonly AnalyteKey[];
  readonly analysis: Partial<Readonly<Record<AnalysisKey, Figure>>>;
  readonly release: string;
  readonly cautions: readonly Caution[];
  readonly source: Source;
};
