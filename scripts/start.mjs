import { buildEngraver, ensureBuild } from './lib/build.mjs';
import { checkDatabaseUrl } from './lib/database-url.mjs';
import { ownDatabase } from './lib/own-cluster.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { webPort } from './lib/ports.mjs';
import { prepareDatabase } from './lib/prepare-database.mjs';
import { end, main } from './lib/processes.mjs';
import { requireWritable } from './lib/writable.mjs';
import { authSecret } from './lib/secret.mjs';
import { loadSettings } from './lib/settings.mjs';
import { Stop } from './lib/stop.mjs';
import { startWebServer } from './lib/web-server.mjs';

const isDevelopment = process.argv.includes('--dev');

function showAccounts(accounts) {
  console.log('\nDemo accounts, on this machine only:');
  for (const { role, email, password } of accounts) console.log(`  ${role.padEnd(14)} ${email.padEnd(30)} ${password}`);
}

async function build() {
  const started = Date.now();
  const note = setTimeout(() => console.log('Building the application (once after each change, about half a minute) …'), 300);
  const { code, output } = await ensureBuild();
  clearTimeout(note);
  if (code === 0) return;
  console.error(output);
  throw new Stop(`The application could not be built after ${Math.round((Date.now() - started) / 1000)} s: mend what the build names above, and start again.`);
}

await main(async () => {
  loadSettings();
  requireWritable();
  const port = await webPort();
  await ensurePackages();
  const elsewhere = process.env.DATABASE_URL;
  if (elsewhere) await checkDatabaseUrl(elsewhere);
  const databaseUrl = elsewhere || (await ownDatabase());
  const tasks = elsewhere ? ['migrate', 'studies', 'purge'] : ['migrate', 'studies', 'purge', 'accounts'];
  const printed = await prepareDatabase(databaseUrl, tasks);
  await (isDevelopment ? buildEngraver() : build());
  const command = isDevelopment ? 'dev' : 'start';
  const { url, child } = await startWebServer({ command, port, databaseUrl, secret: authSecret(), publicUrl: process.env.NEXTAUTH_URL });
  console.log(`\nSesqui is at ${url}`);
  if (elsewhere) console.log('It uses the database in DATABASE_URL; demo accounts are not made there.');
  else showAccounts(JSON.parse(printed));
  console.log('\nCtrl-C ends it.');
  child.once('exit', () => void end(1, 'The web server has ended by itself: start again, and report what it said above if it does not stay up.'));
});
