import { sql } from 'drizzle-orm';
import { check, customType, index, integer, jsonb, pgEnum, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import type { Study } from '../../engine';
import { studies } from './studies';
import { users } from './users';

export const exportState = pgEnum('export_state', ['queued', 'running', 'done', 'failed', 'cancelled']);

const bytea = customType<{ data: Uint8Array; driverData: Buffer }>({ dataType: () => 'bytea', toDriver: (bytes) => Buffer.from(bytes) });
const moment = () => timestamp({ withTimezone: true, precision: 3 });

/** What is asked for besides the study. */
export type ExportOptions = {
  readonly what: 'score' | 'part' | 'parts';
  readonly as: 'pdf' | 'musicxml' | 'mxl' | 'mid' | 'csv';
  /** id of the player whose part it is */
  readonly player?: string | undefined;
  /** how a print is laid out; `staff` in millimetres. Other files have no pages */
  readonly page?: { readonly paper: 'a4' | 'letter'; readonly orientation: 'portrait' | 'landscape'; readonly staff: number } | undefined;
};

/**
 * Prints and other files that take longer than an answer may: asked for, being made, made. One is somebody's own, or a guest's who holds its
 * token, or of a demo study and then anybody's. The study is a saved version, or the document itself until the job ends.
 */
export const exportJobs = pgTable(
  'export_jobs',
  {
    id: uuid().primaryKey().defaultRandom(),
    ownerId: uuid().references(() => users.id, { onDelete: 'cascade' }),
    /** SHA-256 of the guest's token, in hex */
    tokenHash: text(),
    /** SHA-256 of everything that the file is made from: the same again is the same job */
    key: text().notNull(),
    options: jsonb().$type<ExportOptions>().notNull(),
    studyId: uuid().references(() => studies.id, { onDelete: 'cascade' }),
    version: integer(),
    document: jsonb().$type<Study>(),
    state: exportState().notNull().default('queued'),
    /** pages made, and pages in all once that is known */
    done: integer().notNull().default(0),
    total: integer(),
    result: bytea(),
    resultType: text(),
    resultName: text(),
    errorCode: text(),
    errorMessage: text(),
    /** how often it was begun */
    attempts: integer().notNull().default(0),
    /** who makes it, and until when: later than that, whoever it was has gone */
    worker: uuid(),
    leaseUntil: moment(),
    createdAt: moment().notNull().defaultNow(),
    endedAt: moment(),
  },
  (table) => [
    index('export_jobs_waiting').on(table.createdAt).where(sql`${table.state} in ('queued', 'running')`),
    index('export_jobs_key').on(table.key),
    index('export_jobs_owner').on(table.ownerId),
    index('export_jobs_study').on(table.studyId),
    index('export_jobs_ended').on(table.endedAt).where(sql`${table.endedAt} is not null`),
    check('export_jobs_one_owner', sql`num_nonnulls(${table.ownerId}, ${table.tokenHash}) <= 1`),
    check('export_jobs_of_a_study', sql`(${table.studyId} is null) = (${table.version} is null) and (${table.studyId} is null or ${table.document} is null)`),
    check('export_jobs_done_has_file', sql`(${table.state} = 'done') = (${table.result} is not null)`),
  ],
);
