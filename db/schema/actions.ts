import { sql } from 'drizzle-orm';
import {
  boolean,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  numeric,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { moment, siteColumns, siteRowsOnly } from './columns';
import { plot } from './sites';

export type PlanState = 'draft' | 'adopted' | 'spread' | 'abandoned';
/** The material as it was that day: later edits of a catalogue entry never rewrite the past. */
export type FrozenMaterial = {
  key: string;
  name: string;
  /** How it acts with time; null when it is not known to change a test by itself. */
  reaction: 'sulfur' | 'lime' | 'soluble-salt' | null;
  /** Analytes it acts on, whatever it was meant for. */
  affects: string[];
  analysis: Record<string, number>;
  source: string;
};

export const plan = pgTable(
  'plan',
  {
    ...siteColumns,
    plotId: uuid('plot_id').notNull(),
    year: integer('year').notNull(),
    state: text('state').$type<PlanState>().notNull().default('draft'),
    fromApplication: boolean('from_application').notNull().default(false),
    createdBy: uuid('created_by').notNull(),
    createdAt: moment('created_at').notNull().defaultNow(),
    adoptedAt: moment('adopted_at'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }).onDelete('cascade'),
    index('plan_site_plot_idx').on(t.siteId, t.plotId),
    siteRowsOnly('plan'),
  ],
);

export const planLine = pgTable(
  'plan_line',
  {
    ...siteColumns,
    planId: uuid('plan_id').notNull(),
    material: jsonb('material').$type<FrozenMaterial>().notNull(),
    amountKg: numeric('amount_kg').notNull(),
    areaM2: numeric('area_m2').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.planId], foreignColumns: [plan.siteId, plan.id] }).onDelete('cascade'),
    siteRowsOnly('plan_line'),
  ],
);

/** What the plan says should have changed once the reaction is complete, analyte by analyte, signed. */
export const planIntent = pgTable(
  'plan_intent',
  {
    ...siteColumns,
    planId: uuid('plan_id').notNull(),
    analyte: text('analyte').notNull(),
    unit: text('unit'),
    fullChange: numeric('full_change').notNull(),
    low: numeric('low'),
    high: numeric('high'),
    source: text('source').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.planId], foreignColumns: [plan.siteId, plan.id] }).onDelete('cascade'),
    uniqueIndex('plan_intent_site_plan_analyte_key').on(t.siteId, t.planId, t.analyte),
    siteRowsOnly('plan_intent'),
  ],
);

export const application = pgTable(
  'application',
  {
    ...siteColumns,
    plotId: uuid('plot_id').notNull(),
    planId: uuid('plan_id').notNull(),
    planLineId: uuid('plan_line_id').notNull(),
    material: jsonb('material').$type<FrozenMaterial>().notNull(),
    amountKg: numeric('amount_kg').notNull(),
    amountPrinted: text('amount_printed').notNull(),
    areaM2: numeric('area_m2').notNull(),
    appliedOn: date('applied_on', { mode: 'string' }).notNull(),
    depthCm: numeric('depth_cm'),
    method: text('method').notNull().default(''),
    soilCondition: text('soil_condition').notNull().default(''),
    note: text('note').notNull().default(''),
    recordedBy: uuid('recorded_by').notNull(),
    recordedAt: moment('recorded_at').notNull().defaultNow(),
    supersedesId: uuid('supersedes_id'),
    supersededAt: moment('superseded_at'),
    supersededReason: text('superseded_reason'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.siteId, t.planId], foreignColumns: [plan.siteId, plan.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.siteId, t.planLineId], foreignColumns: [planLine.siteId, planLine.id] }).onDelete(
      'cascade',
    ),
    index('application_site_plot_day_idx').on(t.siteId, t.plotId, t.appliedOn.desc()),
    siteRowsOnly('application'),
  ],
);

/** A verdict as it stood when it last changed; the page computes it anew from the results each time it is read. */
export const effectCheck = pgTable(
  'effect_check',
  {
    ...siteColumns,
    plotId: uuid('plot_id').notNull(),
    planIntentId: uuid('plan_intent_id').notNull(),
    inputs: jsonb('inputs').$type<Record<string, unknown>>().notNull(),
    outcome: jsonb('outcome').$type<Record<string, unknown>>().notNull(),
    verdict: text('verdict').notNull(),
    ruleVersion: text('rule_version').notNull(),
    computedAt: moment('computed_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.siteId, t.planIntentId], foreignColumns: [planIntent.siteId, planIntent.id] }).onDelete(
      'cascade',
    ),
    index('effect_check_site_intent_idx').on(t.siteId, t.planIntentId, t.computedAt.desc()),
    siteRowsOnly('effect_check'),
  ],
);

export type ReminderRuleKind = 'after-lime' | 'after-sulfur' | 'yearly-same-season';
export type ReminderState = 'open' | 'done' | 'dismissed';

export const reminderRule = pgTable(
  'reminder_rule',
  {
    ...siteColumns,
    plotId: uuid('plot_id').notNull(),
    kind: text('kind').$type<ReminderRuleKind>().notNull(),
    active: boolean('active').notNull().default(true),
    createdBy: uuid('created_by').notNull(),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }).onDelete('cascade'),
    uniqueIndex('reminder_rule_site_plot_kind_key').on(t.siteId, t.plotId, t.kind),
    siteRowsOnly('reminder_rule'),
  ],
);

export const reminder = pgTable(
  'reminder',
  {
    ...siteColumns,
    ruleId: uuid('rule_id').notNull(),
    plotId: uuid('plot_id').notNull(),
    dueOn: date('due_on', { mode: 'string' }).notNull(),
    reason: text('reason').notNull().default(''),
    state: text('state').$type<ReminderState>().notNull().default('open'),
    closedBy: uuid('closed_by'),
    closedAt: moment('closed_at'),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.ruleId], foreignColumns: [reminderRule.siteId, reminderRule.id] }).onDelete(
      'cascade',
    ),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }).onDelete('cascade'),
    uniqueIndex('reminder_site_rule_due_key').on(t.siteId, t.ruleId, t.dueOn),
    index('reminder_open_due_idx').on(t.dueOn).where(sql`state = 'open'`),
    siteRowsOnly('reminder'),
  ],
);

export const reminderSnooze = pgTable(
  'reminder_snooze',
  {
    ...siteColumns,
    reminderId: uuid('reminder_id').notNull(),
    personId: uuid('person_id').notNull(),
    until: date('until', { mode: 'string' }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.reminderId], foreignColumns: [reminder.siteId, reminder.id] }).onDelete(
      'cascade',
    ),
    uniqueIndex('reminder_snooze_site_reminder_person_key').on(t.siteId, t.reminderId, t.personId),
    siteRowsOnly('reminder_snooze'),
  ],
);
