import { randomBytes } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { readText, writePrivate } from './files.mjs';
import { data } from './paths.mjs';

/** The key that signs sessions: `NEXTAUTH_SECRET`, else one made once and kept in .data, readable by its owner only. */
export function authSecret() {
  if (process.env.NEXTAUTH_SECRET) return process.env.NEXTAUTH_SECRET;
  const file = path.join(data, 'auth-secret');
  const kept = readText(file)?.trim();
  if (kept) return kept;
  fs.mkdirSync(data, { recursive: true });
  const made = randomBytes(32).toString('base64url');
  writePrivate(file, made);
  return made;
}
