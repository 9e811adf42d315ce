import type { Page } from '@playwright/test';
import { expect, test } from '../helpers/browser';
import { drawnScore, openStudy, setWord, word } from './open';

const writing = (page: Page) => page.getByRole('button', { name: /^How stretches are written/ });

async function choose(page: Page, way: RegExp): Promise<void> {
  await writing(page).click();
  await page.getByRole('dialog').getByRole('radio', { name: way }).check();
  await page.keyboard.press('Escape');
}

test('a stretch in longer values, in new tempos with their equivalence, in new metres: what each asks of a reader', async ({ page }) => {
  await openStudy(page);
  await expect(writing(page)).toHaveText('Written in longer values');
  await writing(page).click();
  const dialog = page.getByRole('dialog');
  await expect(dialog.getByRole('radio')).toHaveCount(3);
  await expect(dialog.getByText(/easiest to read/)).toHaveCount(1);
  await expect(dialog).toContainText(/\d+ symbols, \d+ ties/);
  await page.keyboard.press('Escape');

  await choose(page, /^new tempos/);
  const systems = await drawnScore(page);
  await expect(systems.first().getByTestId('tempo-mark').first()).toHaveText('quarter = 84');
  await expect(systems.first().getByTestId('tempo-mark').nth(1)).toHaveText('quarter tied to sixteenth = quarter, quarter = 67 1/5');
  // What sounds stays as it is.
  await expect(page.getByTestId('facts')).toContainText('3′40″');
  await expect(page.getByText('Statement 2 of 4, temple blocks: at 5/4 times its length, forwards, 13 attacks, 5 measures long, measures 5 to 8, from 0′11″ to 0′26″.')).toBeVisible();

  await choose(page, /^new metres/);
  await expect(writing(page)).toHaveText('Written in new metres');
  await page.getByRole('button', { name: /^Undo/ }).click();
  await expect(writing(page)).toHaveText('Written in new tempos');
});

test('where statements at different factors sound at once, the other ways are refused with the reason', async ({ page }) => {
  await openStudy(page);
  await setWord(page, 'Factors', '1, 3/2');
  await word(page, 'Entries').click();
  await page.getByRole('dialog', { name: 'Entries' }).getByRole('radio', { name: 'all beginning together' }).check();
  await page.keyboard.press('Escape');
  await writing(page).click();
  const dialog = page.getByRole('dialog');
  await expect(dialog.getByRole('radio', { name: /^new tempos/ })).toBeDisabled();
  await expect(dialog).toContainText('In “Filling” lines at 1 and at 3/2 times their length sound at once: they cannot share a tempo. Write it in longer values.');
  await expect(dialog).toContainText('they cannot share a metre');
});
