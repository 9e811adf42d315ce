import fs from 'node:fs';
import { inRoot } from './paths.mjs';
import { run } from './processes.mjs';
import { Stop } from './stop.mjs';

/** Keeps Debian from starting a database server of its own beside ours while the package is set up. */
const POSTGRESQL = `
apt-get update -q
apt-get install -y -q --no-install-recommends postgresql-common
conf=/etc/postgresql-common/createcluster.conf
trap 'sed -i "/^create_main_cluster = false # sesqui$/d" "$conf"' EXIT
echo 'create_main_cluster = false # sesqui' >> "$conf"
apt-get install -y -q --no-install-recommends postgresql`;

const CHROMIUM = `
apt-get update -q
apt-get install -y -q --no-install-recommends chromium`;

async function install(name, packageName, script) {
  const byHand = `apt-get update && apt-get install -y ${packageName}`;
  if ((await run('apt-get', ['--version'], { quiet: true })).code !== 0) {
    throw new Stop(`${name} is missing, and there is no apt-get here to install it: install ${name} and start again.`);
  }
  const isRoot = process.getuid() === 0;
  if (!isRoot && (await run('sudo', ['-n', 'true'], { quiet: true })).code !== 0) {
    throw new Stop(`${name} is missing, and this account may not install it: run “sudo sh -c '${byHand}'” (or as root “${byHand}”) and start again.`);
  }
  console.log(`Installing ${name} from Debian (once) …`);
  const shell = ['env', 'DEBIAN_FRONTEND=noninteractive', 'sh', '-ec', script];
  const [command, ...args] = isRoot ? shell : ['sudo', '-n', ...shell];
  const { code, output } = await run(command, args, { quiet: true });
  if (code !== 0) {
    const reason = output.split('\n').find((line) => /^(E|Err):/.test(line)) ?? output.trim().split('\n').at(-1);
    throw new Stop(`${name} could not be installed (${reason}): run “${byHand}” as root to see more, and start again.`);
  }
}

export const installPostgres = () => install('PostgreSQL', 'postgresql', POSTGRESQL);

/** Debian's Chromium for the browser tests, installed where it is missing. */
export async function ensureChromium() {
  if (!fs.existsSync('/usr/bin/chromium')) await install('Chromium', 'chromium', CHROMIUM);
}

/** xmllint, where the schema that it would check against is here; the tests that ask for it are skipped where it cannot be had. */
export async function tryXmllint() {
  if (!fs.existsSync(inRoot('../shared/reference/musicxml-schema')) || fs.existsSync('/usr/bin/xmllint')) return;
  try {
    await install('xmllint', 'libxml2-utils', 'apt-get update -q\napt-get install -y -q --no-install-recommends libxml2-utils');
  } catch (error) {
    if (!(error instanceof Stop)) throw error;
    console.log(error.message);
  }
}
