import { sql } from 'drizzle-orm';
import { boolean, check, index, integer, jsonb, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import type { Study } from '../../engine';
import { users } from './users';

/** Saved pieces. A demo study has a slug and no owner; every other study has an owner. */
export const studies = pgTable(
  'studies',
  {
    id: uuid().primaryKey().defaultRandom(),
    ownerId: uuid().references(() => users.id, { onDelete: 'cascade' }),
    slug: text().unique(),
    title: text().notNull(),
    /** one sentence for lists */
    summary: text().notNull().default(''),
    /** the study document, as `parseStudy` gives it */
    document: jsonb().$type<Study>().notNull(),
    /** the document's `format` */
    format: integer().notNull().default(1),
    /** counts saves, from 1; `study_versions` keeps each */
    version: integer().notNull().default(1),
    isDemo: boolean().notNull().default(false),
    createdAt: timestamp({ withTimezone: true }).notNull().defaultNow(),
    updatedAt: timestamp({ withTimezone: true }).notNull().defaultNow(),
    /** set when thrown away; nothing lists it then */
    deletedAt: timestamp({ withTimezone: true }),
  },
  (table) => [
    index('studies_owner_updated')
      .on(table.ownerId, table.updatedAt.desc())
      .where(sql`${table.deletedAt} is null`),
    check('studies_demo_or_owned', sql`${table.isDemo} = (${table.ownerId} is null) and (not ${table.isDemo} or ${table.slug} is not null)`),
    check('studies_version_from_1', sql`${table.version} >= 1`),
  ],
);
