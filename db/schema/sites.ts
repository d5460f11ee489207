import { sql } from 'drizzle-orm';
import {
  boolean,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  numeric,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { moment, siteColumns, siteRowsOnly } from './columns';
import { person } from './people';

export type Role = 'owner' | 'adviser' | 'helper' | 'viewer';
export type Point = [x: number, y: number];

const thisSite = sql`id = nullif(current_setting('app.site_id', true), '')::uuid`;

export const site = pgTable(
  'site',
  {
    id: uuid('id').primaryKey().defaultRandom(),
    name: text('name').notNull(),
    country: text('country').notNull().default('US'),
    hemisphere: text('hemisphere').$type<'north' | 'south'>().notNull().default('north'),
    timeZone: text('time_zone').notNull().default('America/New_York'),
    warmMonths: boolean('warm_months').array().notNull(),
    planWidthM: numeric('plan_width_m').notNull().default('40'),
    planHeightM: numeric('plan_height_m').notNull().default('25'),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  () => [
    pgPolicy('site_site_rows', { as: 'permissive', for: 'all', to: 'public', using: thisSite, withCheck: thisSite }),
  ],
);

export const membership = pgTable(
  'membership',
  {
    ...siteColumns,
    personId: uuid('person_id')
      .notNull()
      .references(() => person.id, { onDelete: 'cascade' }),
    role: text('role').$type<Role>().notNull(),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    uniqueIndex('membership_site_person_key').on(t.siteId, t.personId),
    index('membership_person_idx').on(t.personId),
    siteRowsOnly('membership'),
  ],
);

export type InvitationState = 'open' | 'accepted' | 'declined' | 'revoked';

export const invitation = pgTable(
  'invitation',
  {
    ...siteColumns,
    email: text('email').notNull(),
    role: text('role').$type<Role>().notNull(),
    tokenHash: text('token_hash').notNull().unique(),
    state: text('state').$type<InvitationState>().notNull().default('open'),
    invitedBy: uuid('invited_by').notNull(),
    expiresAt: moment('expires_at').notNull(),
    answeredAt: moment('answered_at'),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    uniqueIndex('invitation_site_open_email_key').on(t.siteId, sql`lower(${t.email})`).where(sql`state = 'open'`),
    siteRowsOnly('invitation'),
  ],
);

export const auditEvent = pgTable(
  'audit_event',
  {
    ...siteColumns,
    at: moment('at').notNull().defaultNow(),
    personId: uuid('person_id'),
    act: text('act').notNull(),
    objectKind: text('object_kind').notNull(),
    objectId: text('object_id').notNull(),
    detail: jsonb('detail').$type<Record<string, unknown>>().notNull().default({}),
    requestId: text('request_id'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    index('audit_event_site_at_idx').on(t.siteId, t.at.desc()),
    siteRowsOnly('audit_event'),
  ],
);

export const plot = pgTable(
  'plot',
  {
    ...siteColumns,
    name: text('name').notNull(),
    outline: jsonb('outline').$type<Point[]>().notNull(),
    outlineSince: date('outline_since', { mode: 'string' }),
    areaTypedM2: numeric('area_typed_m2'),
    texture: text('texture').$type<'light' | 'medium' | 'heavy'>(),
    established: boolean('established').notNull().default(true),
    freeLimeSeen: boolean('free_lime_seen').notNull().default(false),
    targetSetKey: text('target_set_key'),
    targetSetId: uuid('target_set_id'),
    notes: text('notes').notNull().default(''),
    archivedAt: moment('archived_at'),
    version: integer('version').notNull().default(1),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    uniqueIndex('plot_site_name_key').on(t.siteId, sql`lower(${t.name})`).where(sql`archived_at is null`),
    siteRowsOnly('plot'),
  ],
);

export const planting = pgTable(
  'planting',
  {
    ...siteColumns,
    plotId: uuid('plot_id').notNull(),
    year: integer('year').notNull(),
    crop: text('crop').notNull(),
    targetSetKey: text('target_set_key'),
    targetSetId: uuid('target_set_id'),
    plannedOn: date('planned_on', { mode: 'string' }),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }).onDelete('cascade'),
    uniqueIndex('planting_site_plot_year_crop_key').on(t.siteId, t.plotId, t.year, t.crop),
    siteRowsOnly('planting'),
  ],
);

/** A grower's own bands. An edit is a new version, so a chart can draw the band that was in force on a day. */
export const targetSet = pgTable(
  'target_set',
  {
    ...siteColumns,
    key: text('key').notNull(),
    version: integer('version').notNull().default(1),
    name: text('name').notNull(),
    validFrom: date('valid_from', { mode: 'string' }).notNull(),
    createdBy: uuid('created_by').notNull(),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    uniqueIndex('target_set_site_key_version_key').on(t.siteId, t.key, t.version),
    siteRowsOnly('target_set'),
  ],
);

export const target = pgTable(
  'target',
  {
    ...siteColumns,
    targetSetId: uuid('target_set_id').notNull(),
    analyte: text('analyte').notNull(),
    low: numeric('low').notNull(),
    high: numeric('high').notNull(),
    unit: text('unit'),
    method: text('method'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.targetSetId], foreignColumns: [targetSet.siteId, targetSet.id] }).onDelete(
      'cascade',
    ),
    uniqueIndex('target_site_set_analyte_key').on(t.siteId, t.targetSetId, t.analyte),
    siteRowsOnly('target'),
  ],
);
