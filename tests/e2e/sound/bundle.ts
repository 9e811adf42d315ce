import path from 'node:path';
import { type Page } from '@playwright/test';
import { build } from 'vite';

const root = path.resolve(import.meta.dirname, '../../..');

/** Builds the player, the engine and the demos into one script with Vite. @param entry - a file of this folder */
export async function bundleHarness(entry = 'harness.ts'): Promise<string> {
  const result = await build({
    root,
    configFile: false,
    logLevel: 'error',
    resolve: { alias: { '@': root } },
    build: { write: false, minify: false, lib: { entry: path.join(root, 'tests/e2e/sound', entry), formats: ['iife'], name: 'harness' } },
  });
  const outputs = Array.isArray(result) ? result : [result];
  for (const one of outputs) {
    if (!('output' in one)) continue;
    for (const chunk of one.output) if (chunk.type === 'chunk') return chunk.code;
  }
  throw new Error('Vite built no script.');
}

/** Opens an empty page of its own, under an address that no server answers, and runs the script in it. */
export async function openHarness(page: Page, script: string): Promise<void> {
  await page.route('https://sound.test/**', (route) => {
    const isScript = route.request().url().endsWith('.js');
    return route.fulfill(isScript ? { contentType: 'text/javascript; charset=utf-8', body: script } : { contentType: 'text/html', body: '<!doctype html><title>Sound</title>' });
  });
  await page.goto('https://sound.test/');
  await page.addScriptTag({ url: 'https://sound.test/harness.js' });
}
