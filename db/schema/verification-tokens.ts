import { pgTable, primaryKey, text, timestamp } from 'drizzle-orm/pg-core';

/** One-time tokens of sign-in links. */
export const verificationTokens = pgTable(
  'verification_tokens',
  {
    identifier: text().notNull(),
    token: text().notNull(),
    expires: timestamp({ withTimezone: true }).notNull(),
  },
  (table) => [primaryKey({ columns: [table.identifier, table.token] })],
);
