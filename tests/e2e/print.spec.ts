import { expect, forgetRefusals, test } from '../helpers/browser';

test('a score and a part as they come out of the printer, page by page, on the paper that was chosen', async ({ page }) => {
  await page.goto('/studies/lock-gates/print');
  await expect(page.getByRole('heading', { name: 'Print Lock Gates' })).toBeVisible();
  const sheets = page.getByRole('listitem', { name: /^Page/ });
  await expect(page.getByText(/^\d+ pages\.$/)).toBeVisible();
  await expect(page.getByRole('button', { name: 'Print' })).toBeEnabled();
  expect(await sheets.count()).toBeGreaterThan(1);
  await expect(sheets.nth(0)).toContainText('Players and instruments');
  await expect(sheets.nth(1)).toContainText('Filling');

  await page.getByLabel('What').selectOption({ label: 'Part of Player 2' });
  await expect(sheets.nth(0)).toContainText('Player 2');
  await expect(sheets.nth(0)).toContainText('To Flower pots');
  await page.getByLabel('Paper').selectOption('letter');
  await page.getByLabel('Held').selectOption('across');
  await expect(page).toHaveURL(/part=p2&paper=letter&orientation=landscape/);
  // ANSI/ASME Y14.1: 11 by 8 1/2 inches.
  await expect(sheets.nth(0)).toHaveCSS('aspect-ratio', '792 / 612');

  await page.reload();
  await expect(page.getByLabel('What')).toHaveValue('p2');
  const pdf = await page.pdf({ preferCSSPageSize: true });
  const media = /\/MediaBox \[0 0 (\d+)(?:\.\d+)? (\d+)/.exec(pdf.toString('latin1'));
  expect([Number(media?.[1]), Number(media?.[2])]).toEqual([792, 612]);
});

test('what is only in this browser is printed as it stands here', async ({ page, complaints }) => {
  await page.goto('/studies/lock-gates');
  await page.getByRole('button', { name: 'Rename' }).click();
  await page.getByLabel('Name', { exact: true }).fill('Rising water');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name: 'How “Rising water” is made' })).toBeVisible();
  await page.waitForTimeout(400);
  await page.goto('/studies/lock-gates/print');
  await expect(page.getByRole('listitem', { name: 'Page 2' })).toContainText('Rising water');
  await expect(page.getByRole('listitem', { name: 'Page 2' })).toContainText('not saved as a version');
  await page.goto('/studies/nothing-of-the-kind/print');
  await expect(page.getByRole('main').getByRole('alert')).toContainText('There is no such study');
  forgetRefusals(complaints);
});
