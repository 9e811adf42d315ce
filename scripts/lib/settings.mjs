import fs from 'node:fs';
import { inRoot } from './paths.mjs';

/** Reads .env, if there is one (see .env.example); what the environment sets goes before. */
export function loadSettings() {
  const file = inRoot('.env');
  if (fs.existsSync(file)) process.loadEnvFile(file);
}
