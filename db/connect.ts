import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import pg from 'pg';
import * as schema from './schema';

export type Database = NodePgDatabase<typeof schema>;

/**
 * Opens a pool of connections; nothing is sent before the first query.
 * @param url - `postgresql://…`
 * @param max - most connections at once
 */
export function connect(url: string, max = 10): { database: Database; pool: pg.Pool } {
  const pool = new pg.Pool({ connectionString: url, max, connectionTimeoutMillis: 5_000 });
  // An idle connection that the server closes is replaced at the next query; without a listener it would end the process.
  pool.on('error', () => undefined);
  return { database: drizzle(pool, { schema, casing: 'snake_case' }), pool };
}
