import { index, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import { users } from './users';

/** Kept for the sign-in library's adapter: sessions themselves are signed tokens in the browser. */
export const sessions = pgTable(
  'sessions',
  {
    sessionToken: text().primaryKey(),
    userId: uuid()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    expires: timestamp({ withTimezone: true }).notNull(),
  },
  (table) => [index('sessions_user').on(table.userId)],
);
