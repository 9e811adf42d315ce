import type { Page } from '@playwright/test';
import { expect, test } from '../helpers/browser';
import { openStudy, sentence, setWord, signIn } from './open';

const saving = (page: Page) => page.getByTestId('saving');
const SAVED = /^Saved \d\d:\d\d, version \d+$/;

/** Begins a study on the server and opens it. @returns its id */
async function beginOwn(page: Page): Promise<string> {
  const { study } = (await (await page.request.get('/api/studies/lock-gates')).json()) as { study: { document: object } };
  const answer = await page.request.post('/api/studies', {
    data: { document: { ...study.document, title: 'Night Barge' }, saveId: crypto.randomUUID() },
    headers: { origin: new URL(page.url()).origin },
  });
  expect(answer.status()).toBe(201);
  const { study: made } = (await answer.json()) as { study: { id: string } };
  await openStudy(page, made.id);
  return made.id;
}

test.beforeEach(async ({ page }) => {
  await signIn(page, 'composer');
});

test('saves by itself and says so in words; undo reaches past a save; another machine finds it', async ({ page, browser }) => {
  const id = await beginOwn(page);
  await expect(saving(page)).toHaveText(SAVED);
  await setWord(page, 'Factors', '1, 2');
  await expect(saving(page)).toHaveText(/^Saved \d\d:\d\d, version 2$/);
  await setWord(page, 'Factors', '1, 2, 3');
  await expect(saving(page)).toHaveText(/^Saved \d\d:\d\d, version 3$/);
  await page.getByRole('button', { name: 'Undo' }).click();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(sentence(page)).toContainText('at 1, 5/4, 3/2, 2 times its length');
  await expect(saving(page)).toHaveText(/^Saved \d\d:\d\d, version [45]$/);

  const elsewhere = await (await browser.newContext()).newPage();
  await signIn(elsewhere, 'composer');
  await openStudy(elsewhere, id);
  await expect(sentence(elsewhere)).toContainText('at 1, 5/4, 3/2, 2 times its length');
  await elsewhere.context().close();
});

test('quick to type through: many changes, few saves, the last one there', async ({ page }) => {
  const id = await beginOwn(page);
  let puts = 0;
  page.on('request', (request) => {
    if (request.method() === 'PUT') puts += 1;
  });
  const field = page.getByRole('textbox', { name: /^Lengths in whole notes/ });
  await field.fill('1 1 1');
  await field.press('End');
  await field.pressSequentially(' 1/2 1/2 1/4 1/4 1/4 1/4', { delay: 25 });
  await expect(saving(page)).toHaveText(SAVED);
  await page.waitForTimeout(1_500);
  await expect(saving(page)).toHaveText(SAVED);
  expect(puts).toBeGreaterThan(0);
  expect(puts).toBeLessThan(6);
  const { study } = (await (await page.request.get(`/api/studies/${id}`)).json()) as { study: { document: { subjects: { rhythm: string }[] } } };
  expect(study.document.subjects[0]!.rhythm).toBe('1 1 1 1/2 1/2 1/4 1/4 1/4 1/4');
});

test('without a connection the work stays, says so, survives a reload of the page, and is saved when it comes back', async ({ page, complaints }) => {
  const id = await beginOwn(page);
  await page.context().setOffline(true);
  await setWord(page, 'Factors', '1, 4');
  await expect(saving(page)).toContainText('Not saved yet.');
  await expect(saving(page)).toContainText('Your work is kept in this browser and will be saved by itself.');
  await expect(sentence(page)).toContainText('at 1, 4 times its length');
  expect(await page.evaluate((key) => localStorage.getItem(`sesqui.draft.${key}`), id)).toContain('"4"');
  await page.context().setOffline(false);
  await expect(saving(page)).toHaveText(SAVED, { timeout: 15_000 });
  await page.reload();
  await expect(sentence(page)).toContainText('at 1, 4 times its length');
  // Requests that were cut off are reported by the browser.
  complaints.length = 0;
});

test('a page that goes away before it has saved is saved at its next opening', async ({ page, complaints }) => {
  const id = await beginOwn(page);
  await page.route('**/api/studies/*', (route) => (route.request().method() === 'PUT' ? route.abort() : route.continue()));
  await setWord(page, 'Factors', '1, 7');
  await page.goto('/studies');
  await page.unroute('**/api/studies/*');
  await openStudy(page, id);
  await expect(sentence(page)).toContainText('at 1, 7 times its length');
  await expect(saving(page)).toHaveText(/^Saved \d\d:\d\d, version 2$/);
  complaints.length = 0;
});

for (const choice of ['mine', 'theirs'] as const) {
  test(`two tabs on one study: the second save is refused, the difference shown, ${choice} goes on, both are kept`, async ({ page, context, complaints }) => {
    const id = await beginOwn(page);
    const other = await context.newPage();
    await openStudy(other, id);
    await setWord(other, 'Factors', '1, 2');
    await expect(saving(other)).toHaveText(/version 2$/);
    await setWord(page, 'Factors', '1, 3');
    await expect(saving(page)).toContainText('another version was saved first');
    await page.getByRole('button', { name: 'Show what differs' }).click();
    const row = page.getByRole('row', { name: /Section “Filling”/ });
    await expect(row).toContainText('at 1, 3 times');
    await expect(row).toContainText('at 1, 2 times');
    if (choice === 'mine') {
      await page.getByRole('button', { name: 'Go on with this one, as version 3' }).click();
      await expect(saving(page)).toHaveText(/version 3$/);
      await expect(sentence(page)).toContainText('at 1, 3 times its length');
      const kept = (await (await page.request.get(`/api/studies/${id}/versions/2`)).json()) as unknown;
      expect(JSON.stringify(kept)).toContain('["1","2"]');
    } else {
      await page.getByRole('button', { name: 'Go on with the other, keep this one as a copy' }).click();
      await expect(sentence(page)).toContainText('at 1, 2 times its length');
      await expect(saving(page)).toHaveText(/version 2$/);
      await page.goto('/studies');
      await expect(page.getByRole('link', { name: /Night Barge \(my version\)/ }).first()).toBeVisible();
    }
    complaints.length = 0;
  });
}

test('a demonstration is kept as one’s own by a word', async ({ page }) => {
  await openStudy(page, 'footbridge');
  await page.getByRole('button', { name: 'Keep as my study' }).click();
  await expect(page).toHaveURL(/\/studies\/[0-9a-f]{8}-/);
  await expect(saving(page)).toHaveText(SAVED);
});

test('every save is kept: a version is looked at, and gone back to', async ({ page }) => {
  await beginOwn(page);
  await setWord(page, 'Factors', '1, 2');
  await expect(saving(page)).toHaveText(/version 2$/);
  await page.getByRole('button', { name: 'Versions' }).click();
  await page.getByRole('button', { name: 'What differs from version 1' }).click();
  await expect(page.getByRole('row', { name: /Section “Filling”/ })).toContainText('at 1, 5/4, 3/2, 2 times');
  await page.getByRole('button', { name: 'Go back to version 1' }).click();
  await expect(sentence(page)).toContainText('at 1, 5/4, 3/2, 2 times its length');
  await expect(saving(page)).toHaveText(/version 3$/);
  await expect(page.getByText('Version 3', { exact: true })).toBeVisible();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(sentence(page)).toContainText('at 1, 2 times its length');
});
