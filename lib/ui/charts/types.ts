/** What the charts are given. Numbers are in the unit shown; days are ISO dates ("2026-05-03"). */

export interface ChartAnalyte {
  readonly label: string;
  /** Empty for pH, which has no unit. */
  readonly unit: string;
  /** pH axes never start at zero and use ticks of 0.2 or 0.5. */
  readonly isPh: boolean;
  readonly decimals: number;
}

export interface DriftPoint {
  readonly id: string;
  readonly takenOn: string;
  /** For a result below (or above) what the laboratory can read: the limit itself. Unused for 'below-unknown'. */
  readonly value: number;
  /** As the report prints it: "6.3", "< 0.1". */
  readonly printed: string;
  /** 'below-unknown': printed as 0 or "not detected" without a limit; it stands at the foot of the chart. */
  readonly qualifier: 'exact' | 'below' | 'above' | 'below-unknown';
  /** 95 % range of this one test; null where no noise figure is known. */
  readonly low: number | null;
  readonly high: number | null;
  readonly method: string;
  readonly laboratory: string;
  readonly depth: string;
  /** Set where this test may not be joined to the one before it, e.g. "methods differ". */
  readonly breakBefore: string | null;
  /** Where this test can be read in full. */
  readonly href?: string;
}

export interface DriftAmendment {
  readonly id: string;
  readonly on: string;
  /** Short, for the axis: "Sulfur 12 lb". */
  readonly label: string;
  /** For the list and the table: amount, area, depth. */
  readonly detail?: string;
}

export interface TargetBand {
  readonly low: number | null;
  readonly high: number | null;
  /** "6.0 to 6.8, vegetables". */
  readonly label: string;
  /** Publisher, title and year, or "your own target". */
  readonly source: string;
}

export interface DriftChartProps {
  /** "pH in water, North bed" */
  readonly title: string;
  readonly analyte: ChartAnalyte;
  /** Confirmed results, any order. */
  readonly points: readonly DriftPoint[];
  readonly amendments: readonly DriftAmendment[];
  readonly band: TargetBand | null;
  /** One sentence; when left out it is written from the points, without any claim of a trend. */
  readonly finding?: string;
  /** Set when the finding already stands above the chart; it stays the figure's name. */
  readonly hideFinding?: boolean;
  /** The day the chart is drawn for: the right end of the time axis. */
  readonly asOf: string;
  /** Printed under an exported picture: site and where the numbers come from. */
  readonly source: string;
  /** Without extension: "north-bed-ph". */
  readonly fileName: string;
  readonly locale?: string;
}

/** `low` or `high` null = no bound on that side. */
export interface Interval {
  readonly estimate: number;
  readonly low: number | null;
  readonly high: number | null;
}

export interface MiniSeries {
  readonly analyte: ChartAnalyte;
  readonly points: readonly DriftPoint[];
  readonly band: TargetBand | null;
  readonly href?: string;
}

export interface SmallMultiplesProps {
  readonly title: string;
  /** Drawn in the order given; the caller keeps that order the same every year. */
  readonly series: readonly MiniSeries[];
  readonly amendments: readonly DriftAmendment[];
  /** One time axis for all. */
  readonly from: string;
  readonly asOf: string;
  readonly locale?: string;
}

export interface IntervalStripProps {
  readonly analyte: ChartAnalyte;
  /** Signed, in the unit shown: −0.5 = half a pH unit down was planned. */
  readonly planned: number;
  /** What stands at the planned change; "due" where only a part of the plan was due by the test. */
  readonly plannedWord?: 'planned' | 'due';
  /** The change seen with its 90 % interval, signed. */
  readonly change: Interval;
  /** Half and one and a half times the plan on this scale, signed; null = no bound (planned falls on a log scale). */
  readonly half: number;
  readonly oneAndHalf: number | null;
  /** "compared with 2 untreated plots" */
  readonly comparedWith?: string;
  /** Set when the sentence already stands above the strip. */
  readonly hideSentence?: boolean;
}

export interface DumbbellEnd {
  readonly takenOn: string;
  readonly value: number;
  readonly printed: string;
  readonly low: number | null;
  readonly high: number | null;
}

export interface DumbbellProps {
  readonly analyte: ChartAnalyte;
  readonly before: DumbbellEnd;
  readonly after: DumbbellEnd;
  /** Where the after-test was meant to land (half to one and a half times the plan). */
  readonly intended: { readonly low: number | null; readonly high: number | null };
  readonly target?: TargetBand | null;
  /** An arrow is drawn only when the interval of the change leaves out "no change". */
  readonly changeIsClear: boolean;
  readonly intervalWords?: string;
  readonly locale?: string;
}

export interface CompareTest {
  /** "Spring 2026, North bed" */
  readonly label: string;
  readonly takenOn: string;
  readonly value: number;
  readonly printed: string;
  readonly low: number | null;
  readonly high: number | null;
  readonly note?: string;
}

export interface CompareStripProps {
  readonly analyte: ChartAnalyte;
  readonly earlier: CompareTest;
  readonly later: CompareTest;
  /** Either a difference or the reason why there is none. */
  readonly outcome:
    | {
        readonly kind: 'difference';
        /** later − earlier with its 90 % interval */
        readonly difference: Interval;
        readonly moreThanNoise: boolean;
        /** Why the interval is wider: "another season", "another laboratory". */
        readonly widenedBy: readonly string[];
      }
    | { readonly kind: 'refused'; readonly reason: string };
  /** Under the zero of the difference: two tests of one plot changed, two plots differ. */
  readonly zeroWord?: string;
  readonly locale?: string;
}
