import { checkDatabaseUrl } from './lib/database-url.mjs';
import { ownDatabase } from './lib/own-cluster.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { prepareDatabase } from './lib/prepare-database.mjs';
import { main } from './lib/processes.mjs';
import { loadSettings } from './lib/settings.mjs';
import { Stop } from './lib/stop.mjs';

await main(async () => {
  loadSettings();
  const [task] = process.argv.slice(2);
  if (task !== 'migrate' && task !== 'seed') throw new Stop('Say what to do: node scripts/db.mjs migrate, or node scripts/db.mjs seed.');
  await ensurePackages();
  const elsewhere = process.env.DATABASE_URL;
  if (elsewhere) await checkDatabaseUrl(elsewhere);
  const seed = elsewhere ? ['studies'] : ['studies', 'accounts'];
  await prepareDatabase(elsewhere || (await ownDatabase()), task === 'migrate' ? ['migrate'] : ['migrate', ...seed]);
  console.log(task === 'migrate' ? 'The tables are those of this release.' : 'The demo is in the database.');
  return 0;
});
