import type { Page } from '@playwright/test';
import { expect, forgetRefusals, test } from '../helpers/browser';
import { register } from './open';

const titles = (page: Page) => page.getByRole('list', { name: 'Your studies' }).getByRole('link').allTextContents();
const row = (page: Page, title: string) => page.getByRole('listitem').filter({ hasText: title });

/** Studies of the reader's own, from the demonstrations. */
async function keep(page: Page, ...wanted: [slug: string, title: string][]): Promise<void> {
  for (const [slug, title] of wanted) {
    const answer = await page.request.post(`/api/studies/${slug}/copy`, { data: { title }, headers: { origin: new URL(page.url()).origin } });
    expect(answer.status()).toBe(201);
  }
  await page.reload();
}

test.beforeEach(async ({ page }) => {
  await register(page);
});

test('an empty account says what to do', async ({ page }) => {
  await expect(page.getByText('Nothing yet. Start a study, or open a demonstration and keep it as yours.')).toBeVisible();
  await page.getByRole('radio', { name: 'Deleted' }).check();
  await expect(page.getByText('Nothing. What you delete is kept here for 30 days.')).toBeVisible();
});

test('sorted by change, title and length, with length, form and time; found by part of the title', async ({ page }) => {
  await keep(page, ['lock-gates', 'Beta Barge'], ['three-ferries', 'alpha 100%'], ['footbridge', 'Gamma Barge']);
  await expect.poll(() => titles(page)).toEqual(['Gamma Barge', 'alpha 100%', 'Beta Barge']);
  await page.getByRole('radio', { name: 'Title' }).check();
  await expect.poll(() => titles(page)).toEqual(['alpha 100%', 'Beta Barge', 'Gamma Barge']);
  await page.getByRole('radio', { name: 'Length' }).check();
  await expect.poll(() => titles(page)).toEqual(['alpha 100%', 'Gamma Barge', 'Beta Barge']);
  await expect(row(page, 'Beta Barge')).toContainText('77 measures, 3′40″');
  await expect(row(page, 'Beta Barge')).toContainText(/Last changed .*, version 1/);
  await page.getByLabel('Find by title').fill('BARGE');
  await expect.poll(() => titles(page)).toEqual(['Gamma Barge', 'Beta Barge']);
  await page.getByLabel('Find by title').fill('0%');
  await expect.poll(() => titles(page)).toEqual(['alpha 100%']);
  await page.getByLabel('Find by title').fill('no such');
  await expect(page.getByText('No title holds “no such”.')).toBeVisible();
});

test('renamed, duplicated, deleted, undone at once, and brought back later', async ({ page, complaints }) => {
  await keep(page, ['lock-gates', 'Night Barge']);
  await row(page, 'Night Barge').getByRole('button', { name: /Rename/ }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('textbox').fill('  ');
  await dialog.getByRole('button', { name: 'Set' }).click();
  await expect(dialog.getByRole('alert')).toHaveText('A title is missing.');
  forgetRefusals(complaints);
  await dialog.getByRole('textbox').fill('Day Barge');
  await dialog.getByRole('button', { name: 'Set' }).click();
  await expect.poll(() => titles(page)).toEqual(['Day Barge']);
  await expect(row(page, 'Day Barge')).toContainText('version 2');

  await page.getByRole('button', { name: 'Duplicate “Day Barge”' }).click();
  await expect.poll(() => titles(page)).toEqual(['Day Barge (copy)', 'Day Barge']);

  await page.getByRole('button', { name: 'Delete “Day Barge”' }).click();
  const undo = page.getByRole('status').filter({ hasText: '“Day Barge” is deleted.' });
  await expect.poll(() => titles(page)).toEqual(['Day Barge (copy)']);
  await undo.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(() => titles(page)).toEqual(['Day Barge (copy)', 'Day Barge']);

  await page.getByRole('button', { name: 'Delete “Day Barge (copy)”' }).click();
  await page.reload();
  await page.getByRole('radio', { name: 'Deleted' }).check();
  await expect(row(page, 'Day Barge (copy)')).toContainText('kept until');
  await page.getByRole('button', { name: 'Bring back “Day Barge (copy)”' }).click();
  await page.getByRole('radio', { name: 'Kept' }).check();
  await expect.poll(() => titles(page)).toEqual(['Day Barge (copy)', 'Day Barge']);
});

test('by keyboard alone: find, delete, undo', async ({ page }) => {
  await keep(page, ['lock-gates', 'Night Barge'], ['footbridge', 'Day Barge']);
  await page.getByLabel('Find by title').focus();
  await page.keyboard.type('night');
  await expect.poll(() => titles(page)).toEqual(['Night Barge']);
  const press = async (name: string) => {
    for (let stops = 0; stops < 20; stops += 1) {
      await page.keyboard.press('Tab');
      const label = await page.evaluate(() => document.activeElement?.getAttribute('aria-label') ?? document.activeElement?.textContent ?? '');
      if (label === name) return page.keyboard.press('Enter');
    }
    throw new Error(`Tab does not reach “${name}”.`);
  };
  await press('Delete “Night Barge”');
  await expect(page.getByText('No title holds “night”.')).toBeVisible();
  await page.getByLabel('Find by title').focus();
  await press('Undo');
  await expect.poll(() => titles(page)).toEqual(['Night Barge']);
});

test('page by page', async ({ page }) => {
  await keep(page, ...Array.from({ length: 32 }, (_, index): [string, string] => ['footbridge', `Lock ${String(index + 1).padStart(2, '0')}`]));
  await expect.poll(async () => (await titles(page)).length).toBe(30);
  await page.getByRole('button', { name: 'Show more' }).click();
  await expect.poll(async () => (await titles(page)).length).toBe(32);
  expect(new Set(await titles(page)).size).toBe(32);
  await expect(page.getByRole('button', { name: 'Show more' })).toHaveCount(0);
});
