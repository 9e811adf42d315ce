import { expect, test } from '../helpers/browser';
import { alert } from './open';

test('says what it does, and its example changes and plays', async ({ page }) => {
  await page.goto('/');
  await expect(page.getByRole('img', { name: 'Sesqui' })).toBeVisible();
  const threads = page.getByRole('img', { name: /^6 statements/ });
  await expect(threads).toHaveAccessibleName('6 statements: 4 measures, 6 measures, 9 measures, 9 measures, 6 measures, 4 measures');
  await page.getByRole('button', { name: /^Each to the one before: / }).click();
  await page.getByRole('radio', { name: 'twice as long' }).check();
  await expect(threads).toHaveAccessibleName('6 statements: 4 measures, 8 measures, 16 measures, 16 measures, 8 measures, 4 measures');
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: 'Hear this one' }).click();
  await expect(page.getByRole('button', { name: 'Stop' })).toBeVisible();
  await expect.poll(() => page.locator('svg rect[visibility="visible"]').count()).toBe(1);
  await page.getByRole('button', { name: 'Stop' }).click();
  await expect(page.getByRole('button', { name: 'Hear this one' })).toBeVisible();
});

test('light and dark: as the system, and by the switch, over a reload', async ({ page }) => {
  await page.emulateMedia({ colorScheme: 'dark' });
  await page.goto('/');
  const paper = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
  expect(await paper()).toBe('rgb(18, 19, 21)');
  const change = page.getByRole('button', { name: /Change$/ });
  await change.click();
  await change.click();
  await expect.poll(paper).toBe('rgb(252, 251, 247)');
  await page.reload();
  expect(await paper()).toBe('rgb(252, 251, 247)');
});

test('signs in with an account of this test machine, and refuses a wrong password alike', async ({ page, complaints }) => {
  await page.goto('/sign-in');
  await page.getByRole('textbox', { name: 'E-mail' }).fill('composer@sesqui.example');
  await page.getByLabel('Password').fill('not-the-password');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(alert(page).filter({ hasText: 'do not go together' })).toBeVisible();
  // The refusal is answered with 401, which the browser reports.
  complaints.length = 0;
});

for (const width of [360, 768, 1440, 2560]) {
  test(`nothing runs over the edge at ${width} px`, async ({ page }) => {
    await page.setViewportSize({ width, height: 900 });
    for (const path of ['/', '/studies', '/studies/lock-gates', '/studies/three-ferries', '/studies/footbridge', '/sign-in']) {
      await page.goto(path);
      await page.waitForLoadState('networkidle');
      if (path.startsWith('/studies/')) await expect(page.getByTestId('process-sentence')).toBeVisible();
      const over = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
      expect(over, path).toBe(0);
    }
  });
}
