import type { AnalyteKey } from '../analytes';
import type { Day } from '../days';
import type { ApplicationId, LaboratoryId, PlotId, ResultId } from '../ids';

/** One confirmed (or not yet confirmed) number of one plot and day, as the effect check, compare and drift read it. */
export type TestPoint = {
  readonly resultId: ResultId;
  readonly plotId: PlotId;
  readonly analyte: AnalyteKey;
  readonly day: Day;
  /** In the analyte's canonical unit. For 'below' and 'above' the printed limit itself. */
  readonly value: number;
  readonly unit: string;
  /** 'below-unknown': printed as 0 or "not detected" without a limit. */
  readonly qualifier: 'exact' | 'below' | 'above' | 'below-unknown';
  /** Smallest amount the laboratory reports, in `unit`; null = not stated. */
  readonly reportingLimit: number | null;
  /** Key of the method; null = the report does not say. */
  readonly method: string | null;
  /** The test's name as printed; used only when the method is missing. */
  readonly testName: string | null;
  readonly laboratoryId: LaboratoryId | null;
  readonly depthCm: { readonly from: number; readonly to: number } | null;
  readonly basis: 'mass' | 'volume' | 'area' | 'charge' | 'share' | 'index' | 'none';
  /** 'P', 'P2O5', 'K', 'K2O', 'NO3-N' …; null = not declared. */
  readonly form: string | null;
  /** Step in which the number is printed (0.1 for "6.4"); null = unknown, taken as no rounding. */
  readonly printedStep: number | null;
  /** Cores mixed in the bag; null = not written down (then 8 are assumed and said so). */
  readonly cores: number | null;
  /** Analyses of the same bag averaged in `value`; 1 is the rule. */
  readonly labDuplicates: number;
  /** Bags of the plot and day averaged in `value`; 1 is the rule. */
  readonly composites: number;
  readonly confirmed: boolean;
};

export type DuplicatePair = { readonly first: TestPoint; readonly second: TestPoint };

/** Untreated plots, each read on the same two occasions. */
export type UntreatedStep = { readonly pairs: readonly { readonly before: TestPoint; readonly after: TestPoint }[] };

/** What the site has taught about its own noise; rows of other analytes are ignored. */
export type SiteNoise = {
  /** The same bag analysed twice. */
  readonly labDuplicates: readonly DuplicatePair[];
  /** Two bags of one plot and day. */
  readonly fieldDuplicates: readonly DuplicatePair[];
  /** May include the occasions judged now: they are not counted twice. */
  readonly untreatedSteps: readonly UntreatedStep[];
};

/** Twelve flags, January first: the soil is at or above 13 C (55 F). */
export type WarmMonths = readonly boolean[];

export type ReactionKind = 'sulfur' | 'lime' | 'soluble-salt';

/** One application and what it was meant to do in full. */
export type Intent = {
  readonly applicationId: ApplicationId;
  readonly material: string;
  readonly reaction: ReactionKind;
  readonly appliedOn: Day;
  /** Full intended change once all has reacted, signed, in the analyte's unit (pH -0.5; K +45). */
  readonly fullChange: number;
  /** Active part planned and really spread, any one unit; equal when the plan was followed. */
  readonly plannedAmount: number;
  readonly spreadAmount: number;
};

export type DisturbingEvent = {
  readonly day: Day;
  readonly kind: 'other-application' | 'deep-tillage' | 'imported-soil' | 'new-borders';
  readonly applicationId?: ApplicationId;
  /** Name of the product or work, for the sentence. */
  readonly label: string;
  /** Analytes a product acts on; ignored for the other kinds. */
  readonly affects?: readonly AnalyteKey[];
};

export type ControlPlot = {
  readonly plotId: PlotId;
  readonly name: string;
  readonly tests: readonly TestPoint[];
  /** Anything that happened to the control between the tests makes it useless; it is then listed as unused. */
  readonly events: readonly DisturbingEvent[];
};

export type EffectInput = {
  readonly analyte: AnalyteKey;
  readonly today: Day;
  readonly warmMonths: WarmMonths;
  readonly plotId: PlotId;
  readonly plotName: string;
  /** The first one is the application asked about; more than one means: judge them together. */
  readonly intents: readonly [Intent, ...Intent[]];
  /** Tests of this plot; those of other analytes are ignored. */
  readonly tests: readonly TestPoint[];
  readonly events: readonly DisturbingEvent[];
  readonly controls: readonly ControlPlot[];
  /** Readings of all plots of the site, this one included (the before round is picked from them by day). */
  readonly siteTests: readonly TestPoint[];
  readonly noise: SiteNoise;
  /** The site's own drift of this analyte, learnt from `tests` tests; subtracted only from 4 tests on and without controls. */
  readonly drift?: { readonly perYear: number; readonly sd: number; readonly df: number; readonly tests: number };
  /** An after-test chosen by hand; marked "second look" unless it is the one the rule takes. */
  readonly afterTestId?: ResultId;
};

export const VERDICTS = [
  'as intended',
  'short of it',
  'beyond it',
  'no change seen',
  'went the other way',
  'right way, size not settled',
  'cannot tell yet',
] as const;
export type Verdict = (typeof VERDICTS)[number];

export const NO_VERDICTS = [
  'not comparable',
  'planned change too small to check',
  'too early',
  'waiting for the after-test',
  'no verdict',
] as const;
export type NoVerdict = (typeof NO_VERDICTS)[number];

export const REFUSALS = [
  'extractant',
  'ph-medium',
  'depth',
  'unit-basis',
  'om-method',
  'cec-method',
  'season',
  'too-early',
  'too-late',
  'overlap',
  'unconfirmed',
  'out-of-range',
  'method-unknown',
  'plan-too-small',
  'no-noise-figure',
  'no-before-test',
  'no-after-test',
  'both-below-limit',
  'unknown-limit',
  'above-limit',
  'other-analyte',
] as const;
export type RefusalCode = (typeof REFUSALS)[number];

/** pH is additive; concentrations are judged on natural logs; low or censored ones in their own unit. */
export type WorkingScale = 'additive' | 'log' | 'low-values';

export type NoiseComponent = {
  readonly key:
    | 'plot-before'
    | 'plot-after'
    | 'controls'
    | 'occasion'
    | 'season'
    | 'laboratory'
    | 'site-mean'
    | 'drift'
    | 'reliability';
  readonly variance: number;
  readonly df: number;
  readonly learnt: boolean;
};

/** One way of reading the change, on the working scale and in natural units. */
export type Reading = {
  readonly withControls: boolean;
  readonly scale: WorkingScale;
  /** Working scale, signed as measured. */
  readonly D: number;
  readonly s: number;
  readonly nu: number;
  readonly q: number;
  readonly lo: number;
  readonly hi: number;
  readonly verdict: Verdict;
  /** Natural units (pH, mg/kg, %): estimate and 90% interval of the change. */
  readonly change: number;
  readonly changeLo: number;
  readonly changeHi: number;
  /** Corrected before value and the part of the raw change that the correction took away (natural units). */
  readonly correctedBefore: number;
  readonly correction: number;
  readonly rho: number;
  readonly components: readonly NoiseComponent[];
  readonly sentence: string;
};

export type BeforeUsed = {
  readonly test: TestPoint;
  readonly weight: number;
  readonly sameSeason: boolean;
  readonly sameLaboratory: boolean;
};
export type ControlUse = {
  readonly plotId: PlotId;
  readonly name: string;
  readonly used: boolean;
  /** Only when not used. */
  readonly why?:
    | 'not-sampled-the-same-days'
    | 'other-laboratory'
    | 'not-comparable'
    | 'something-happened'
    | 'below-limit';
};

export type Remedy = {
  readonly kind: 'cores' | 'second-composite' | 'controls' | 'another-test' | 'larger-step';
  readonly count?: number;
  /** A whole sentence. */
  readonly text: string;
};

export type EffectOutcome =
  | {
      readonly ok: true;
      readonly verdict: Verdict;
      /** The reading that counts: with controls when there are any. */
      readonly reading: Reading;
      /** The same without controls, when controls were used. */
      readonly withoutControls?: Reading;
      readonly unit: string;
      /** Intended change by the after-test, the full one, and the whole plan before anything was spread short. */
      readonly intended: number;
      readonly planned: number;
      readonly reactedShare: number;
      readonly before: readonly BeforeUsed[];
      readonly after: TestPoint;
      readonly controls: readonly ControlUse[];
      readonly secondLook: boolean;
      readonly combined: boolean;
      /** Sentences to show in this order; the first is the verdict. */
      readonly sentences: readonly string[];
      /** Cheapest first; empty when settled. */
      readonly settle: readonly Remedy[];
      readonly ruleVersion: string;
    }
  | {
      readonly ok: false;
      readonly answer: NoVerdict;
      readonly reason: RefusalCode;
      readonly sentence: string;
      /** When waiting or too early: the first day a test can judge, and the last. */
      readonly from?: Day;
      readonly until?: Day;
      /** Both values stand side by side whenever there are two. */
      readonly before?: TestPoint;
      readonly after?: TestPoint;
      readonly ruleVersion: string;
    };

export type CompareInput = { readonly a: TestPoint; readonly b: TestPoint; readonly noise: SiteNoise };

export type CompareOutcome =
  | {
      readonly ok: true;
      readonly scale: WorkingScale;
      /** b minus a in natural units with its 90% interval. */
      readonly difference: number;
      readonly lo: number;
      readonly hi: number;
      /** b over a with its 90% interval; concentrations only. */
      readonly ratio?: { readonly estimate: number; readonly lo: number; readonly hi: number };
      readonly moreThanNoise: boolean;
      readonly s: number;
      readonly nu: number;
      readonly unit: string;
      readonly widenedBy: readonly ('season' | 'laboratory')[];
      readonly components: readonly NoiseComponent[];
      readonly sentence: string;
      readonly notes: readonly string[];
    }
  | {
      readonly ok: false;
      readonly reason: RefusalCode;
      readonly sentence: string;
      readonly a: TestPoint;
      readonly b: TestPoint;
    };
