import { integer, jsonb, pgTable, primaryKey, timestamp, uuid } from 'drizzle-orm/pg-core';
import type { Study } from '../../engine';
import { studies } from './studies';
import { users } from './users';

/** Every saved state of a study, the present one included. */
export const studyVersions = pgTable(
  'study_versions',
  {
    studyId: uuid()
      .notNull()
      .references(() => studies.id, { onDelete: 'cascade' }),
    version: integer().notNull(),
    document: jsonb().$type<Study>().notNull(),
    /** null for the demo's own releases, and where the account is gone */
    savedBy: uuid().references(() => users.id, { onDelete: 'set null' }),
    createdAt: timestamp({ withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.studyId, table.version] })],
);
