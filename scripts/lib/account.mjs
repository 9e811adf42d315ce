import fs from 'node:fs';
import path from 'node:path';
import { run } from './processes.mjs';
import { Stop } from './stop.mjs';

const idOf = async (option, name) => Number((await run('id', [option, name], { quiet: true })).output);

/**
 * The account that the database runs under, as options for `spawn`: PostgreSQL refuses to run as root, so root hands over to
 * the owner of the data folder, or to Debian's `postgres`. Anybody else runs it as themselves.
 */
export async function databaseAccount(folder) {
  if (process.getuid() !== 0) return { cwd: '/' };
  const stat = fs.statSync(folder, { throwIfNoEntry: false });
  if (stat && stat.uid !== 0) return { cwd: '/', uid: stat.uid, gid: stat.gid };
  const [uid, gid] = [await idOf('-u', 'postgres'), await idOf('-g', 'postgres')];
  if (!uid || !gid) throw new Stop('There is no account “postgres” for the database to run under: install Debian’s package postgresql, which makes it.');
  return { cwd: '/', uid, gid };
}

/**
 * Makes the first of `folders` that the account can reach and write, mode 700; those it cannot are left as they were.
 * @returns its path
 */
export async function makeFolderFor(account, folders) {
  for (const folder of folders) {
    try {
      fs.mkdirSync(path.dirname(folder), { recursive: true });
      fs.mkdirSync(folder, { mode: 0o700 });
      if (account.uid !== undefined) fs.chownSync(folder, account.uid, account.gid);
    } catch {
      continue;
    }
    if ((await run('test', ['-w', folder, '-a', '-x', folder], { ...account, quiet: true })).code === 0) return folder;
    fs.rmdirSync(folder);
  }
  throw new Stop(`The database found no folder it may write to among ${folders.join(', ')}: make one of them writable, or set DATABASE_URL.`);
}
