import fs from 'node:fs';
import path from 'node:path';
import { installPostgres } from './debian.mjs';
import { readText } from './files.mjs';
import { run } from './processes.mjs';
import { Stop } from './stop.mjs';

const DEBIAN = '/usr/lib/postgresql';
const environment = { PATH: process.env.PATH, LC_ALL: 'C.UTF-8' };

function installedVersions() {
  const names = fs.existsSync(DEBIAN) ? fs.readdirSync(DEBIAN) : [];
  return names.filter((name) => fs.existsSync(path.join(DEBIAN, name, 'bin/initdb'))).sort((a, b) => Number(b) - Number(a));
}

/**
 * The folder of PostgreSQL's programs, installed from Debian where it is missing.
 * @param wanted - the major version that made an existing data folder; the newest will do where there is none
 */
export async function postgresPrograms(wanted) {
  if (installedVersions().length === 0) await installPostgres();
  const [newest] = installedVersions();
  if (!newest) throw new Stop(`PostgreSQL was installed, but its programs are not in ${DEBIAN}: install Debian’s package postgresql again.`);
  if (wanted && !installedVersions().includes(wanted)) {
    throw new Stop(`The database was made by PostgreSQL ${wanted}, which is no longer installed: install Debian’s package postgresql-${wanted}.`);
  }
  return path.join(DEBIAN, wanted ?? newest, 'bin');
}

/** The major version that made a data folder, undefined where it holds no database. */
export const versionOf = (folder) => readText(path.join(folder, 'PG_VERSION'))?.trim();

/**
 * Fills an empty folder with a new cluster whose one account, `sesqui`, needs the password.
 * @param account - see `databaseAccount`
 */
export async function initCluster({ programs, folder, account, password }) {
  const file = `${folder}.password`;
  fs.writeFileSync(file, password, { mode: 0o600 });
  if (account.uid !== undefined) fs.chownSync(file, account.uid, account.gid);
  const args = ['-D', folder, '-U', 'sesqui', '--auth=scram-sha-256', `--pwfile=${file}`, '--encoding=UTF8', '--locale=C.UTF-8'];
  const { code, output } = await run(path.join(programs, 'initdb'), args, { ...account, env: environment, quiet: true });
  fs.rmSync(file);
  if (code !== 0) throw new Stop(`The database could not be made in ${folder}: ${output.trim().split('\n').at(-1)}`);
}

/** The process and port of a cluster that runs on a folder, undefined where none does. */
export function runningCluster(folder) {
  const lines = readText(path.join(folder, 'postmaster.pid'))?.split('\n');
  if (!lines) return undefined;
  const [pid, port] = [Number(lines[0]), Number(lines[3])];
  const command = readText(`/proc/${pid}/cmdline`) ?? '';
  return command.includes('postgres') && command.includes(folder) ? { pid, port } : undefined;
}

/**
 * Starts a cluster on 127.0.0.1 and waits until it answers.
 * @param options - settings such as `fsync=off`
 * @returns undefined, or the first thing the server complained about
 */
export async function startCluster({ programs, folder, account, port, options = [] }) {
  const log = path.join(folder, 'server.log');
  fs.rmSync(log, { force: true });
  // Left by a cluster that was cut off; its process number may by now be another program's, which would keep ours from starting.
  if (!runningCluster(folder)) fs.rmSync(path.join(folder, 'postmaster.pid'), { force: true });
  const settings = ['listen_addresses=127.0.0.1', `port=${port}`, 'unix_socket_directories=', ...options].map((one) => `-c ${one}`).join(' ');
  const args = ['-D', folder, '-w', '-t', '60', '-l', log, '-o', settings, 'start'];
  const { code, output } = await run(path.join(programs, 'pg_ctl'), args, { ...account, env: environment, quiet: true });
  if (code === 0) return undefined;
  const complaint = (readText(log) ?? output).split('\n').find((line) => /(FATAL|PANIC|ERROR|could not)/.test(line));
  return complaint?.replace(/^.*?(FATAL|PANIC|ERROR|LOG): +/, '') ?? output.trim().split('\n').at(-1) ?? 'no reason given';
}

/** Stops a cluster, if it runs, and waits until it has. */
export async function stopCluster({ programs, folder, account }) {
  if (!runningCluster(folder)) return;
  const args = ['-D', folder, '-m', 'fast', '-w', '-t', '30', 'stop'];
  const { code, output } = await run(path.join(programs, 'pg_ctl'), args, { ...account, env: environment, quiet: true });
  if (code !== 0) throw new Stop(`The database did not stop: ${output.trim().split('\n').at(-1)}`);
}
