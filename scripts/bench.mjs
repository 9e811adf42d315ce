import fs from 'node:fs';
import { ensurePackages } from './lib/packages.mjs';
import { inRoot } from './lib/paths.mjs';
import { main } from './lib/processes.mjs';
import { runTs } from './lib/run-ts.mjs';
import { Stop } from './lib/stop.mjs';

await main(async () => {
  await ensurePackages();
  const folder = inRoot('tests/bench');
  const asked = process.argv.slice(2);
  const files = fs.existsSync(folder) ? fs.readdirSync(folder).filter((name) => /\.m?ts$/.test(name)).sort() : [];
  const chosen = asked.length ? files.filter((name) => asked.includes(name.replace(/\.\w+$/, ''))) : files;
  if (chosen.length === 0) throw new Stop(`There is no such measurement in tests/bench; there are: ${files.map((name) => name.replace(/\.\w+$/, '')).join(', ') || 'none'}.`);
  let code = 0;
  for (const name of chosen) code = (await runTs(`tests/bench/${name}`)).code || code;
  return code;
});
