import { expect, test } from '../helpers/browser';
import { openStudy, sentence, word } from './open';

test('by keyboard alone: a word is opened, a factor changed, Escape closes, the focus comes back', async ({ page }) => {
  await openStudy(page);
  const factors = word(page, 'Factors');
  for (let presses = 0; presses < 60; presses += 1) {
    await page.keyboard.press('Tab');
    if (await factors.evaluate((element) => element === document.activeElement)) break;
  }
  await expect(factors).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('dialog', { name: 'Factors' })).toBeVisible();
  await page.keyboard.press('Escape');
  await expect(page.getByRole('dialog', { name: 'Factors' })).toHaveCount(0);
  await expect(factors).toBeFocused();
  await page.keyboard.press('Space');
  await page.keyboard.press('Tab');
  await expect(page.getByRole('textbox', { name: 'Factors, with commas between' })).toBeFocused();
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type('1, 2, 3');
  await page.keyboard.press('Enter');
  await expect(sentence(page)).toContainText('at 1, 2, 3 times its length');
  await expect(word(page, 'Factors')).toBeFocused();
  await page.keyboard.press('ControlOrMeta+z');
  await expect(sentence(page)).toContainText('at 1, 5/4, 3/2, 2 times its length');
  await page.keyboard.press('ControlOrMeta+Shift+z');
  await expect(sentence(page)).toContainText('at 1, 2, 3 times its length');
});

test('by keyboard alone: strip, threads and playback', async ({ page }) => {
  await openStudy(page);
  const form = page.getByRole('region', { name: 'Form' });
  await form.getByRole('button', { name: /^Filling\./ }).focus();
  for (let n = 0; n < 5; n += 1) await page.keyboard.press('ArrowRight');
  await expect(form.getByRole('button', { name: /^Sluice\. / })).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name: 'How “Sluice” is made' })).toBeVisible();
  await form.getByRole('button', { name: /^Pound\./ }).focus();
  await page.keyboard.press('Enter');

  const first = page.getByRole('slider', { name: /^Statement 1 of 4/ });
  await first.focus();
  await page.keyboard.press('End');
  await expect(first).toHaveAttribute('aria-valuetext', /^Attack 13 of 13/);
  await page.keyboard.press('ArrowDown');
  await expect(page.getByRole('slider', { name: /^Statement 2 of 4/ })).toBeFocused();
  await page.keyboard.press('Escape');
  await expect(first).toHaveAttribute('aria-valuetext', 'no attack chosen');

  const play = page.getByRole('button', { name: 'Play', exact: true });
  await play.focus();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('dialog', { name: 'Before the first sound' })).toContainText('Playback starts quiet and is limited');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('button', { name: 'Pause' })).toBeVisible();
  await expect(page.getByTestId('now')).not.toHaveText('measure 1 · 0′00″', { timeout: 15_000 });
  await page.getByRole('button', { name: 'Pause' }).focus();
  await page.keyboard.press('Enter');
  await expect(play).toBeVisible();
});
