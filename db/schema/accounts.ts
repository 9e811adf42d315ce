import { index, integer, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { users } from './users';

/** Accounts at outside sign-in providers; the property names are the sign-in library's. */
export const accounts = pgTable(
  'accounts',
  {
    userId: uuid()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    type: text().notNull(),
    provider: text().notNull(),
    providerAccountId: text().notNull(),
    refresh_token: text(),
    access_token: text(),
    expires_at: integer(),
    token_type: text(),
    scope: text(),
    id_token: text(),
    session_state: text(),
  },
  (table) => [
    primaryKey({ columns: [table.provider, table.providerAccountId] }),
    index('accounts_user').on(table.userId),
  ],
);
