import { expect, test } from '../helpers/browser';
import { drawnScore, openStudy } from './open';

test.beforeEach(async ({ page }) => {
  await page.addInitScript(() => localStorage.setItem('sesqui.hearing-read', 'yes'));
});

test('plays from the choice; the place moves on strip, threads and staff; stop brings it back', async ({ page }) => {
  await openStudy(page);
  await drawnScore(page);
  await page.getByRole('region', { name: 'Form' }).getByRole('button', { name: /^Statement 2 of 4, temple blocks/ }).click();
  await page.getByRole('button', { name: 'From here' }).click();
  await expect(page.getByRole('button', { name: 'Pause' })).toBeVisible();
  await expect(page.getByTestId('now')).toHaveText(/^measure [5-6] · 0′1[1-9]″$/);
  const cursors = () =>
    page.evaluate(() => ({
      strip: document.querySelector<HTMLElement>('section[aria-label="Form"] div[style*="left"].pointer-events-none')?.style.left ?? '',
      threads: [...document.querySelectorAll('svg rect[visibility="visible"]')].length,
      staff: [...document.querySelectorAll<HTMLElement>('[data-cursor]')].filter((line) => !line.hidden).map((line) => line.style.transform),
    }));
  await expect.poll(async () => (await cursors()).threads).toBe(1);
  const first = await cursors();
  expect(first.staff).toHaveLength(1);
  await expect.poll(async () => parseFloat((await cursors()).strip)).toBeGreaterThan(parseFloat(first.strip));
  await expect.poll(async () => (await cursors()).staff).not.toEqual(first.staff);
  await page.getByRole('button', { name: 'Stop' }).click();
  await expect(page.getByRole('button', { name: 'Play', exact: true })).toBeVisible();
});

test('slower, louder within the limit, alone, silent, in a loop', async ({ page }) => {
  await openStudy(page);
  await page.getByRole('combobox', { name: 'Speed' }).selectOption({ label: '50 %' });
  await page.getByRole('button', { name: 'Volume' }).click();
  const volume = page.getByRole('slider', { name: /^Volume/ });
  await expect(volume).toHaveValue('-18');
  await expect(volume).toHaveAttribute('max', '0');
  await volume.fill('-30');
  await expect(page.getByText('Volume: -30 dB')).toBeVisible();
  await page.getByRole('button', { name: 'Heard: all' }).click();
  await page.getByRole('checkbox', { name: 'Crotales alone' }).check();
  await expect(page.getByRole('button', { name: 'Alone: 1' })).toBeVisible();
  await page.getByRole('checkbox', { name: 'Crotales alone' }).uncheck();
  await page.getByRole('checkbox', { name: 'Tam-tam silent' }).check();
  await expect(page.getByRole('button', { name: 'Silent: 1' })).toBeVisible();

  await page.getByRole('region', { name: 'Form' }).getByRole('button', { name: /^Sluice\. / }).click();
  await page.getByRole('combobox', { name: 'Speed' }).selectOption({ label: 'full speed' });
  await page.getByRole('button', { name: 'Loop choice' }).click();
  await page.getByRole('button', { name: 'Play', exact: true }).click();
  // Sluice lasts 80/7 seconds: a little later the loop has come round, and the place is inside it still.
  await expect(page.getByTestId('now')).toHaveText(/^measure 27 /, { timeout: 20_000 });
  await expect(page.getByTestId('now')).toHaveText(/^measure 24 /, { timeout: 20_000 });
  await expect(page.getByRole('button', { name: 'Pause' })).toBeVisible();
});

test('goes on at the same place while the study is changed', async ({ page }) => {
  await openStudy(page);
  await page.getByRole('button', { name: 'Play', exact: true }).click();
  await expect(page.getByTestId('now')).toHaveText(/0′0[2-9]″/, { timeout: 15_000 });
  await page.getByRole('button', { name: /^Tempo: / }).click();
  await page.getByRole('textbox', { name: 'Beats a minute' }).fill('168');
  await page.getByRole('button', { name: 'Set' }).click();
  await expect(page.getByTestId('facts')).toContainText('1′50″');
  await expect(page.getByRole('button', { name: 'Pause' })).toBeVisible();
});
