import fs from 'node:fs';
import type { Page } from '@playwright/test';
import { expect, test } from '../helpers/browser';
import { drawnScore, openStudy, signIn, word } from './open';

const axe = fs.readFileSync('node_modules/axe-core/axe.min.js', 'utf8');

type Found = { id: string; impact: string | null; nodes: { target: string[]; failureSummary?: string }[] };

/** Rules of WCAG 2.2 A and AA, as axe-core checks them. */
async function violations(page: Page): Promise<string[]> {
  await page.evaluate(axe);
  const found = await page.evaluate(async () => {
    const { axe } = window as unknown as { axe: { run: (root: Document, options: object) => Promise<{ violations: Found[] }> } };
    const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
    return (await axe.run(document, { runOnly: { type: 'tag', values: tags } })).violations;
  });
  return found.flatMap(({ id, nodes }) => nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')} ${failureSummary ?? ''}`));
}

for (const scheme of ['light', 'dark'] as const) {
  test(`no violation that can be found by machine, ${scheme}`, async ({ page }) => {
    await page.emulateMedia({ colorScheme: scheme, reducedMotion: 'reduce' });
    for (const path of ['/', '/studies', '/sign-in', '/register', '/proportions', '/check', '/check?mode=find', '/open-api']) {
      await page.goto(path);
      await page.waitForLoadState('networkidle');
      expect(await violations(page), path).toEqual([]);
    }
    for (const id of ['lock-gates', 'three-ferries', 'footbridge']) {
      await openStudy(page, id);
      await drawnScore(page);
      expect(await violations(page), id).toEqual([]);
    }
    await word(page, 'Factors').click();
    expect(await violations(page), 'an open word').toEqual([]);
  });

  test(`nor on the pages of an account, ${scheme}`, async ({ page }) => {
    await page.emulateMedia({ colorScheme: scheme, reducedMotion: 'reduce' });
    await signIn(page, 'administrator');
    await page.request.post('/api/studies/footbridge/copy', { data: {}, headers: { origin: new URL(page.url()).origin } });
    for (const path of ['/studies', '/account', '/people']) {
      await page.goto(path);
      await page.waitForLoadState('networkidle');
      expect(await violations(page), path).toEqual([]);
    }
  });
}
