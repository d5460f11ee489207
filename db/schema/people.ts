import { sql } from 'drizzle-orm';
import {
  bigint,
  boolean,
  date,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
  varchar,
} from 'drizzle-orm/pg-core';
import { moment } from './columns';

export const person = pgTable(
  'person',
  {
    id: uuid('id').primaryKey().defaultRandom(),
    name: text('name').notNull(),
    email: text('email').notNull(),
    passwordHash: text('password_hash').notNull(),
    emailVerifiedAt: moment('email_verified_at'),
    disabledAt: moment('disabled_at'),
    units: text('units').$type<'us' | 'metric'>().notNull().default('us'),
    locale: text('locale').notNull().default('en-US'),
    paper: text('paper').$type<'letter' | 'a4'>().notNull().default('letter'),
    timeZone: text('time_zone').notNull().default('America/New_York'),
    mailHour: integer('mail_hour').notNull().default(7),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [uniqueIndex('person_email_key').on(sql`lower(${t.email})`)],
);

/** The id is the sha-256 of the cookie's token: a copy of this table opens no door. */
export const session = pgTable(
  'session',
  {
    id: text('id').primaryKey(),
    userId: uuid('person_id')
      .notNull()
      .references(() => person.id, { onDelete: 'cascade' }),
    expiresAt: moment('expires_at').notNull(),
    createdAt: moment('created_at').notNull().defaultNow(),
    sharedComputer: boolean('shared_computer').notNull().default(false),
    userAgent: text('user_agent'),
  },
  (t) => [index('session_person_idx').on(t.userId)],
);

export type TokenPurpose = 'verify-address' | 'reset-password' | 'unsubscribe' | 'mail-action';

export const token = pgTable(
  'token',
  {
    id: text('id').primaryKey(),
    personId: uuid('person_id')
      .notNull()
      .references(() => person.id, { onDelete: 'cascade' }),
    purpose: text('purpose').$type<TokenPurpose>().notNull(),
    email: text('email').notNull(),
    payload: jsonb('payload').$type<Record<string, string>>().notNull().default({}),
    expiresAt: moment('expires_at').notNull(),
    usedAt: moment('used_at'),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [index('token_person_purpose_idx').on(t.personId, t.purpose)],
);

/** The limiter's own shape (rate-limiter-flexible): one row a key. */
export const signInAttempt = pgTable('sign_in_attempt', {
  key: varchar('key', { length: 255 }).primaryKey(),
  points: integer('points').notNull().default(0),
  expire: bigint('expire', { mode: 'number' }),
});

export type MailState = 'queued' | 'sending' | 'sent' | 'unknown' | 'failed' | 'suppressed';
export type MailAttachment = { filename: string; content: string; contentType: string };

/** A frozen message: what is sent again after a crash is byte for byte what was sent before it. */
export const outbox = pgTable(
  'outbox',
  {
    id: uuid('id').primaryKey().defaultRandom(),
    personId: uuid('person_id').references(() => person.id, { onDelete: 'cascade' }),
    toAddress: text('to_address').notNull(),
    kind: text('kind').notNull(),
    dedupeKey: text('dedupe_key').notNull(),
    subject: text('subject').notNull(),
    html: text('html').notNull(),
    text: text('text').notNull(),
    headers: jsonb('headers').$type<Record<string, string>>().notNull().default({}),
    attachments: jsonb('attachments').$type<MailAttachment[]>().notNull().default([]),
    state: text('state').$type<MailState>().notNull().default('queued'),
    attempts: integer('attempts').notNull().default(0),
    firstTriedAt: moment('first_tried_at'),
    sentAt: moment('sent_at'),
    providerId: text('provider_id'),
    lastError: text('last_error'),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    uniqueIndex('outbox_person_kind_dedupe_key').on(t.toAddress, t.kind, t.dedupeKey),
    index('outbox_state_idx').on(t.state, t.createdAt),
  ],
);

export const outboxItem = pgTable(
  'outbox_item',
  {
    outboxId: uuid('outbox_id')
      .notNull()
      .references(() => outbox.id, { onDelete: 'cascade' }),
    reminderId: uuid('reminder_id').notNull(),
    dueOn: date('due_on', { mode: 'string' }).notNull(),
  },
  (t) => [primaryKey({ columns: [t.outboxId, t.reminderId] }), index('outbox_item_reminder_idx').on(t.reminderId)],
);

export const mailPreference = pgTable(
  'mail_preference',
  {
    personId: uuid('person_id')
      .notNull()
      .references(() => person.id, { onDelete: 'cascade' }),
    kind: text('kind').notNull(),
    wanted: boolean('wanted').notNull(),
    changedAt: moment('changed_at').notNull().defaultNow(),
  },
  (t) => [primaryKey({ columns: [t.personId, t.kind] })],
);

/** Moves "now" in tests: empty in production, and the application's role may only read it. */
export const clockOffset = pgTable('clock_offset', {
  onlyRow: boolean('only_row').primaryKey().default(true),
  seconds: integer('seconds').notNull(),
});
