import { integer, jsonb, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
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
    /** the document's title, so that a list of versions reads no documents */
    title: text().notNull().default(''),
    document: jsonb().$type<Study>().notNull(),
    /** null for the demo's own releases, and where the account is gone */
    savedBy: uuid().references(() => users.id, { onDelete: 'set null' }),
    /** the sender's own id of this save: sent again, it is not saved again */
    saveId: uuid(),
    createdAt: timestamp({ withTimezone: true, precision: 3 }).notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.studyId, table.version] }),
    uniqueIndex('study_versions_save').on(table.savedBy, table.saveId),
  ],
);
