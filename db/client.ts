import 'server-only';
import { connect, type Database } from './connect';

// Kept on the global object so that the development server's reloads do not open pool after pool.
const store = globalThis as typeof globalThis & { sesquiDatabase?: Database };

/**
 * The application's one pool, opened at the first call, so that a build needs no database.
 * @throws Error where `DATABASE_URL` is not set
 */
export function getDatabase(): Database {
  if (store.sesquiDatabase) return store.sesquiDatabase;
  const url = process.env.DATABASE_URL;
  if (!url) throw new Error('DATABASE_URL is not set. Start Sesqui with npm start, which sets it.');
  store.sesquiDatabase = connect(url).database;
  return store.sesquiDatabase;
}
