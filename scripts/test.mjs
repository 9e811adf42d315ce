import { randomBytes } from 'node:crypto';
import fs from 'node:fs';
import { ensureBuild, nextProgram } from './lib/build.mjs';
import { ensureChromium, tryXmllint } from './lib/debian.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { data, inRoot, root } from './lib/paths.mjs';
import { freePort } from './lib/ports.mjs';
import { prepareDatabase } from './lib/prepare-database.mjs';
import { endChild, main, run } from './lib/processes.mjs';
import { ofOne, ofPlaywright, ofVitest, sum } from './lib/results.mjs';
import { Stop } from './lib/stop.mjs';
import { throwAwayDatabase } from './lib/throw-away-cluster.mjs';
import { startWebServer } from './lib/web-server.mjs';
import { requireWritable } from './lib/writable.mjs';

const STAGES = ['lint', 'types', 'build', 'unit', 'browser'];
const asked = process.argv.slice(2);
const results = new Map();

const program = (file, args, env = {}) =>
  run(process.execPath, [inRoot('node_modules', file), ...args], { cwd: root, env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1', ...env } });

async function stage(name, work) {
  if (asked.length > 0 && !asked.includes(name)) return;
  console.log(`\n── ${name}`);
  const started = Date.now();
  results.set(name, { ...(await work()), seconds: (Date.now() - started) / 1000 });
}

async function types() {
  const generated = await run(process.execPath, [nextProgram, 'typegen'], { cwd: root, quiet: true });
  if (generated.code !== 0) console.error(generated.output);
  return ofOne(generated.code || (await program('typescript/bin/tsc', ['--noEmit'])).code);
}

async function build() {
  const { code, output } = await ensureBuild();
  console.log(output.trim());
  return ofOne(code);
}

/** The production server on the test database; undefined where it does not come up, which has been said then. */
async function serve(databaseUrl, secret) {
  try {
    const { code, output } = await ensureBuild();
    if (code !== 0 && !results.has('build')) console.error(output);
    if (code !== 0) throw new Stop('There is no production build to test against.');
    await prepareDatabase(databaseUrl, ['migrate', 'studies', 'accounts']);
    return await startWebServer({ port: await freePort(), databaseUrl, secret });
  } catch (error) {
    if (!(error instanceof Stop)) throw error;
    console.error(`\n${error.message}`);
    return undefined;
  }
}

async function unit(env) {
  const report = `${data}/vitest.json`;
  fs.rmSync(report, { force: true });
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  const { code } = await program('vitest/vitest.mjs', ['run', '-c', 'tests/vitest.config.ts', ...reporters], env);
  return ofVitest(report, code);
}

async function browser(env) {
  if (!env.TEST_BASE_URL) return ofOne(1);
  const report = `${data}/playwright.json`;
  fs.rmSync(report, { force: true });
  const { code } = await program('@playwright/test/cli.js', ['test', '-c', 'tests/playwright.config.ts'], { ...env, TEST_REPORT: report });
  return ofPlaywright(report, code);
}

function summary() {
  console.log('');
  for (const [name, { passed, failed, skipped, seconds }] of results) {
    const left = skipped ? `, ${skipped} skipped` : '';
    console.log(`${name.padEnd(8)} ${passed} passed, ${failed} failed${left} (${seconds.toFixed(0)} s)`);
  }
  const { passed, failed, skipped } = sum([...results.values()]);
  if (skipped) console.log(`${skipped} skipped`);
  console.log(`${passed} passed, ${failed} failed`);
  return failed === 0 ? 0 : 1;
}

await main(
  async () => {
    const unknown = asked.find((name) => !STAGES.includes(name));
    if (unknown) throw new Stop(`There is no stage “${unknown}”: choose among ${STAGES.join(', ')}, or name none to run them all.`);
    requireWritable();
    fs.mkdirSync(data, { recursive: true });
    await ensurePackages();
    await ensureChromium();
    await tryXmllint();
    const { serverUrl, databaseUrl } = await throwAwayDatabase();
    await stage('lint', async () => ofOne((await program('eslint/bin/eslint.js', ['-c', 'tests/eslint.config.mjs', '.', '--max-warnings', '0'])).code));
    await stage('types', types);
    await stage('build', build);
    const needsServer = asked.length === 0 || asked.includes('unit') || asked.includes('browser');
    const secret = randomBytes(32).toString('base64url');
    const server = needsServer ? await serve(databaseUrl, secret) : undefined;
    const application = server && { TEST_BASE_URL: server.url, TEST_APPLICATION_DATABASE_URL: databaseUrl, TEST_SECRET: secret };
    const env = { TEST_DATABASE_URL: serverUrl, ...application };
    await stage('unit', () => unit(env));
    await stage('browser', () => browser(env));
    if (server) await endChild(server.child);
    return summary();
  },
  { interrupted: 130 },
);
