import path from 'node:path';

/** The clone's top folder. */
export const root = path.resolve(import.meta.dirname, '../..');
/** What belongs to this machine only: database, secret, compiled scripts. Ignored by git. */
export const data = path.join(root, '.data');
export const inRoot = (...parts) => path.join(root, ...parts);
