import type { z } from 'zod';
import type { Role } from '@/lib/access/table';
import type { recordApplicationInput } from '@/lib/schemas/applications';
import type { createPlotInput } from '@/lib/schemas/plots';
import type { setRuleInput } from '@/lib/schemas/reminders';
import type { createTargetSetInput } from '@/lib/schemas/targets';

export type PersonKey = 'maud' | 'tobias' | 'agnes' | 'hester' | 'joss' | 'nell';

export type DemoPerson = { name: string; email: string; password: string; since: string };

export type DemoPlot = Omit<z.input<typeof createPlotInput>, 'outline'> & {
  outline: readonly (readonly [number, number])[];
  crops: readonly { year: number; crop: string; targetSetKey?: string }[];
};

export type DemoReport = {
  /** In fixtures/reports/demo. */
  file: string;
  sentBy: PersonKey;
  sentOn: string;
  /** A report of one sample is dropped on its plot; the others are recognised by their names. */
  droppedOn?: string;
};

/** What happens on a day, in the order in which people did it. */
export type DemoEvent = { on: string; by: PersonKey } & (
  | { kind: 'confirm'; file: string; cores: number; sameAs?: string }
  | { kind: 'spread'; plot: string; input: Omit<z.input<typeof recordApplicationInput>, 'plotId' | 'appliedOn'> }
  | { kind: 'rule'; plot: string; rule: z.input<typeof setRuleInput>['kind'] }
  | { kind: 'targets'; input: z.input<typeof createTargetSetInput> }
);

export type DemoSite = {
  name: string;
  owner: PersonKey;
  since: string;
  plan: { widthM: number; heightM: number };
  members: readonly { who: PersonKey; role: Role }[];
  plots: readonly DemoPlot[];
  reports: readonly DemoReport[];
  events: readonly DemoEvent[];
};
