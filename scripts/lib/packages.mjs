import fs from 'node:fs';
import path from 'node:path';
import { hashOf, readText } from './files.mjs';
import { inRoot, root } from './paths.mjs';
import { run } from './processes.mjs';
import { Stop } from './stop.mjs';

/**
 * Whether node_modules in `folder` holds what package-lock.json asks for: by the stamp of our own install, or, after an
 * install by hand, because npm's own record is the newer.
 */
export function isInstalled(folder) {
  const modules = path.join(folder, 'node_modules');
  const stamp = readText(path.join(modules, '.sesqui-stamp'));
  if (stamp !== undefined) return stamp === hashOf(folder, ['package-lock.json']);
  const record = fs.statSync(path.join(modules, '.package-lock.json'), { throwIfNoEntry: false });
  const lock = fs.statSync(path.join(folder, 'package-lock.json'), { throwIfNoEntry: false });
  return record !== undefined && lock !== undefined && record.mtimeMs >= lock.mtimeMs;
}

/** Installs the npm packages where they are missing or older than package-lock.json. */
export async function ensurePackages() {
  const [major] = process.versions.node.split('.');
  if (Number(major) < 20) throw new Stop(`This is Node.js ${process.versions.node}: install Node.js 20 or later.`);
  if (isInstalled(root)) return;
  console.log('Installing packages (once, about a minute) …');
  const env = { ...process.env, PLAYWRIGHT_SKIP_BROWSER_DOWNLOAD: '1' };
  const { code, output } = await run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], { cwd: root, env, quiet: true });
  if (code !== 0) {
    const reason = output.split('\n').find((line) => /^npm (error|ERR!) (?!code)/.test(line))?.replace(/^npm (error|ERR!) /, '') ?? 'npm gave no reason';
    throw new Stop(`The packages could not be installed (${reason.trim()}): check the network connection and run npm ci in ${root} to see more.`);
  }
  fs.writeFileSync(inRoot('node_modules/.sesqui-stamp'), hashOf(root, ['package-lock.json']));
}
