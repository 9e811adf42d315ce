import { sql } from 'drizzle-orm';
import { check, integer, pgEnum, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core';

export const userRole = pgEnum('user_role', ['composer', 'teacher', 'student', 'administrator']);
export const valueNames = pgEnum('value_names', ['american', 'british']);
export const paperSize = pgEnum('paper_size', ['a4', 'letter']);

/** Who may sign in. The first five columns are those that the sign-in library's adapter takes. */
export const users = pgTable(
  'users',
  {
    id: uuid().primaryKey().defaultRandom(),
    name: text(),
    /** always lower case: see `normaliseEmail` */
    email: text().notNull().unique(),
    emailVerified: timestamp({ withTimezone: true }),
    image: text(),
    /** null where the account signs in by mail only */
    passwordHash: text(),
    role: userRole().notNull().default('composer'),
    /** how the account calls values: quarter or crotchet */
    valueNames: valueNames().notNull().default('american'),
    paperSize: paperSize().notNull().default('a4'),
    /** a session that began at another number has ended */
    sessionEpoch: integer().notNull().default(0),
    /** set when an administrator has closed the account */
    disabledAt: timestamp({ withTimezone: true }),
    createdAt: timestamp({ withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [check('users_email_lower_case', sql`${table.email} = lower(${table.email})`)],
);
