import { sql } from 'drizzle-orm';
import { pgPolicy, timestamp, uuid } from 'drizzle-orm/pg-core';

export const moment = (name: string) => timestamp(name, { withTimezone: true });

/** Every row of a site starts with these two; the primary key is (site_id, id). */
export const siteColumns = {
  siteId: uuid('site_id').notNull(),
  id: uuid('id').notNull().defaultRandom(),
};

/** No context, no rows: nullif keeps an empty setting (what a pooled connection holds after a local set) from throwing. */
const inThisSite = sql`site_id = nullif(current_setting('app.site_id', true), '')::uuid`;

export const siteRowsOnly = (table: string) =>
  pgPolicy(`${table}_site_rows`, {
    as: 'permissive',
    for: 'all',
    to: 'public',
    using: inThisSite,
    withCheck: inThisSite,
  });
