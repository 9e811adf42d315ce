import { sql } from 'drizzle-orm';
import { boolean, check, doublePrecision, index, integer, jsonb, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import type { Study } from '../../engine';
import type { StripSection } from '../figures';
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
    /** the whole length in measures, exact, as a mixed number; empty where it has not been worked out yet */
    measures: text().notNull().default(''),
    /** the whole length in seconds, rounded once from the exact length */
    seconds: doublePrecision().notNull().default(0),
    /** the form drawn small, for lists */
    strip: jsonb().$type<StripSection[]>().notNull().default([]),
    isDemo: boolean().notNull().default(false),
    createdAt: timestamp({ withTimezone: true, precision: 3 }).notNull().defaultNow(),
    updatedAt: timestamp({ withTimezone: true, precision: 3 }).notNull().defaultNow(),
    /** set when thrown away; nothing lists it then */
    deletedAt: timestamp({ withTimezone: true, precision: 3 }),
  },
  (table) => [
    // One for each order of the list, for what is kept and for what was thrown away: read from either end, a page of the list
    // is a stretch of its index. Titles are also found by trigrams, where the server has them: see the migrations.
    index('studies_own_changed').on(table.ownerId, table.updatedAt, table.id).where(sql`${table.deletedAt} is null`),
    index('studies_own_title').on(table.ownerId, sql`lower(${table.title})`, table.id).where(sql`${table.deletedAt} is null`),
    index('studies_own_length').on(table.ownerId, table.seconds, table.id).where(sql`${table.deletedAt} is null`),
    index('studies_deleted_changed').on(table.ownerId, table.updatedAt, table.id).where(sql`${table.deletedAt} is not null`),
    index('studies_deleted_title').on(table.ownerId, sql`lower(${table.title})`, table.id).where(sql`${table.deletedAt} is not null`),
    index('studies_deleted_length').on(table.ownerId, table.seconds, table.id).where(sql`${table.deletedAt} is not null`),
    index('studies_deleted').on(table.deletedAt).where(sql`${table.deletedAt} is not null`),
    check('studies_demo_or_owned', sql`${table.isDemo} = (${table.ownerId} is null) and (not ${table.isDemo} or ${table.slug} is not null)`),
    check('studies_version_from_1', sql`${table.version} >= 1`),
  ],
);
