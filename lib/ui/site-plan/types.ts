import type { ReactNode } from 'react';

/** Metres from the plan's lower left, y up. */
export interface PlanPoint {
  readonly x: number;
  readonly y: number;
}

export type PlanOutline = readonly PlanPoint[];

export type LengthUnit = 'ft' | 'm';

export interface PlanUpload {
  readonly fileName: string;
  /** "3 of 12 MB", "page 2 of 6". */
  readonly text: string;
  /** 0 to 1; null while the amount is not known. */
  readonly share: number | null;
  /** The next step, where there is one: review what was read, answer a question. */
  readonly link?: { readonly href: string; readonly label: string };
}

export interface PlanPlot {
  readonly id: string;
  readonly name: string;
  /** Null where the plot has only a typed area; it then stands in the list alone. */
  readonly outline: PlanOutline | null;
  /** Typed area wins over the outline, and the plan says so. */
  readonly typedAreaM2?: number;
  /** `phDate` where the pH comes from an older test than the last. */
  readonly lastTest?: { readonly date: string; readonly ph: string | null; readonly phDate?: string };
  readonly crop?: string;
  readonly uploads?: readonly PlanUpload[];
  /** Reports that wait for somebody to review them. */
  readonly waiting?: { readonly count: number; readonly href: string };
}

/** Thrown by `onChangeOutline` when whoever throws it says the reason elsewhere on the page. */
export class ToldElsewhere extends Error {}

export interface SitePlanProps {
  readonly siteName: string;
  readonly plots: readonly PlanPlot[];
  readonly unit: LengthUnit;
  /** Degrees clockwise from the plan's up to north; left out when not known. */
  readonly northDegrees?: number;
  /** The ground's size in metres; left out, the plots and a margin decide. */
  readonly ground?: { readonly width: number; readonly height: number };
  readonly selectedPlotId: string | null;
  readonly onSelect: (plotId: string | null) => void;
  readonly plotHref: (plotId: string) => string;
  /** Called with the plot's address in place of following the link, for client-side navigation. */
  readonly onOpen?: (plotId: string) => void;
  /** Where a plot's facts are edited; left out for who may not. */
  readonly editHref?: (plotId: string) => string;
  readonly canEdit: boolean;
  readonly canUpload: boolean;
  /** Rejected: the plan shows the old outline again and says so. */
  readonly onChangeOutline?: (plotId: string, outline: PlanOutline) => Promise<void>;
  readonly onCreate?: (outline: PlanOutline) => void;
  /** Stands beside the plan and above the list: files on their way, say. */
  readonly aside?: ReactNode;
  /** Null: let go over the plan but over no plot. */
  readonly onDropFiles?: (plotId: string | null, files: readonly File[]) => void;
}
