import { migrate } from 'drizzle-orm/node-postgres/migrator';
import type { Database } from './connect';

/**
 * Brings the tables up to this release; does nothing where they are.
 * @param folder - the folder of the SQL migrations
 */
export async function migrateDatabase(database: Database, folder: string): Promise<void> {
  await migrate(database, { migrationsFolder: folder });
}
