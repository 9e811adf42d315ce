import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';

function* filesUnder(folder, at) {
  const full = path.join(folder, at);
  const stat = fs.statSync(full, { throwIfNoEntry: false });
  if (!stat) return;
  if (stat.isFile()) yield at;
  else for (const name of fs.readdirSync(full).sort()) yield* filesUnder(folder, path.join(at, name));
}

/**
 * One hash over the names and contents of files and of all files in folders; what is missing counts as empty.
 * @param folder - what `names` are relative to
 */
export function hashOf(folder, names) {
  const hash = createHash('sha256');
  for (const name of names) {
    for (const file of filesUnder(folder, name)) {
      const content = fs.readFileSync(path.join(folder, file));
      hash.update(`${file}\0${content.length}\0`).update(content);
    }
  }
  return hash.digest('hex');
}

/** A file's text, or undefined where it cannot be read. */
export function readText(file) {
  try {
    return fs.readFileSync(file, 'utf8');
  } catch {
    return undefined;
  }
}

/** Writes a file that only its owner may read, in one step. */
export function writePrivate(file, text) {
  const beside = `${file}.new`;
  fs.rmSync(beside, { force: true });
  fs.writeFileSync(beside, text, { mode: 0o600 });
  fs.renameSync(beside, file);
}
