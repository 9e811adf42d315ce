import path from 'node:path';
import { chromium } from '@playwright/test';
import { build } from 'vite';
import type {} from './browser/score-page';

/**
 * The first system on the screen, and the whole score laid out, for 10, 100 and 1,000 measures of eight instruments: ours, and
 * the same music as MusicXML in two engravers of the registry, one after another in the same run of Debian's Chromium.
 */

const root = process.cwd();

async function script(): Promise<string> {
  const result = await build({
    root,
    configFile: false,
    logLevel: 'error',
    resolve: { alias: { '@': root } },
    build: { write: false, minify: false, lib: { entry: path.join(root, 'tests/bench/browser/score-page.ts'), formats: ['iife'], name: 'score' } },
  });
  for (const one of [result].flat()) if ('output' in one) for (const chunk of one.output) if (chunk.type === 'chunk') return chunk.code;
  throw new Error('Vite built no script.');
}

const SIZES = [[10, 5], [100, 3], [1000, 1]] as const;
const code = await script();
const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ['--no-sandbox'] });
const rows: { measures: number; times: Awaited<ReturnType<Window['measureScores']>> }[] = [];
try {
  for (const [measures, rounds] of SIZES) {
    const page = await browser.newPage({ viewport: { width: 1400, height: 900 } });
    await page.route('https://bench.test/**', (route) =>
      route.fulfill(route.request().url().endsWith('.js') ? { contentType: 'text/javascript; charset=utf-8', body: code } : { contentType: 'text/html; charset=utf-8', body: '<!doctype html><title>Bench</title>' }),
    );
    await page.goto('https://bench.test/');
    await page.addScriptTag({ url: 'https://bench.test/score.js' });
    page.setDefaultTimeout(900_000);
    rows.push({ measures, times: await page.evaluate(([count, times]) => window.measureScores(count, times), [measures, rounds] as const) });
    await page.close();
  }
} finally {
  await browser.close();
}

const ms = (time: number): string => `${time.toFixed(0)} ms`;
const ratio = (a: number, b: number): string => `${(a / b).toFixed(1)} times`;
console.log('\nScore, 8 instruments, in Debian’s Chromium: the first system (theirs: the first page) on the screen, and the whole laid out.\n');
for (const { measures, times: { ours, verovio, sheetDisplay } } of rows) {
  console.log(`${measures} measures`);
  console.log(`  first on the screen: ours ${ms(ours.first)}; verovio ${ms(verovio.first)} (${ratio(verovio.first, ours.first)} ours); opensheetmusicdisplay ${ms(sheetDisplay.first)} (${ratio(sheetDisplay.first, ours.first)} ours)`);
  console.log(`  whole laid out: ours ${ms(ours.whole)}; verovio ${ms(verovio.whole)} (${ratio(verovio.whole, ours.whole)} ours); opensheetmusicdisplay, drawn too, ${ms(sheetDisplay.whole)} (${ratio(sheetDisplay.whole, ours.whole)} ours)`);
}
for (const what of ['first', 'whole'] as const) {
  console.log(`growth from 10 to 1,000 measures, ${what}: ${(['ours', 'verovio', 'sheetDisplay'] as const).map((who) => `${who} ${ratio(rows.at(-1)!.times[who][what], rows[0]!.times[who][what])}`).join(', ')}`);
}
