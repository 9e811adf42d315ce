import { expect, test } from '../helpers/browser';
import { openStudy, sentence, setWord, signIn } from './open';

test('what a guest began and changed moves into the account at sign-in', async ({ page }) => {
  await page.goto('/');
  await page.getByRole('button', { name: 'Start a study' }).first().click();
  await page.getByRole('button', { name: /^Title: / }).click();
  await page.getByRole('textbox', { name: 'Title' }).fill('Guest Lock');
  await page.getByRole('button', { name: 'Set' }).click();
  await openStudy(page, 'lock-gates');
  await setWord(page, 'Factors', '1, 6');
  await page.waitForTimeout(400);
  await signIn(page, 'student');
  const line = page.getByRole('status').filter({ hasText: 'Moved from this browser into your account' });
  await expect(line).toContainText('Guest Lock');
  await expect(line).toContainText('Lock Gates');
  await line.getByRole('link', { name: 'Lock Gates' }).click();
  await expect(sentence(page)).toContainText('at 1, 6 times its length');
  await expect(page.getByTestId('saving')).toHaveText(/version 1$/);
  expect(await page.evaluate(() => Object.keys(localStorage).filter((key) => key.startsWith('sesqui.draft.')))).toEqual([]);
});
