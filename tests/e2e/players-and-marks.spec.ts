import { expect, test } from '../helpers/browser';

test('players, title page, dynamics, a held end and marks: set in words, seen in the score and in a part', async ({ page }) => {
  await page.goto('/studies/lock-gates');
  const players = page.getByRole('region', { name: 'Players' });
  await expect(players.getByRole('listitem')).toHaveCount(4);

  await players.getByRole('button', { name: 'Remove Player 1' }).click();
  await expect(players).toContainText('Crotales and Wood block are played by nobody');
  await players.getByLabel('New player').fill('Ayo');
  await players.getByRole('button', { name: 'Add player' }).click();
  await players.getByRole('button', { name: 'What Ayo plays' }).click();
  const plays = page.getByRole('dialog', { name: 'What Ayo plays' });
  await plays.getByLabel('Crotales').check();
  await plays.getByLabel('Wood block').check();
  await plays.getByLabel('Log drum').check();
  await page.keyboard.press('Escape');
  await expect(players).toContainText('Log drum is shared');
  await expect(players).not.toContainText('nobody');

  await page.getByRole('button', { name: /^Composer and rights/ }).click();
  const title = page.getByRole('dialog', { name: 'Composer and rights' });
  await title.getByLabel('Composer', { exact: true }).fill('Invented Name');
  await title.getByRole('button', { name: 'Set' }).first().click();
  await title.getByLabel('Your line about rights').fill('© 2026 Invented Name');
  await title.getByRole('button', { name: 'Set' }).last().click();

  await page.getByRole('button', { name: /^How loud this section is/ }).click();
  const loud = page.getByRole('dialog', { name: 'How loud this section is' });
  await loud.getByLabel('For each statement in turn').fill('pp < ff');
  await loud.getByRole('button', { name: 'Set' }).last().click();
  await page.getByRole('button', { name: /^How loud this section is: Dynamics pp < ff/ }).click();
  await page.getByRole('dialog', { name: 'How loud this section is' }).getByLabel(/fermata/).check();
  await page.keyboard.press('Escape');

  await page.getByRole('button', { name: /^How attacks of the subject end/ }).click();
  await page.getByRole('dialog', { name: /subject end/ }).getByLabel('Attack 1, dotted quarter').selectOption('let-ring');
  await page.keyboard.press('Escape');
  await expect(page.getByRole('button', { name: /attack 1 rings on/ })).toBeVisible();

  await page.waitForTimeout(400);
  await page.goto('/studies/lock-gates/print');
  const sheets = page.getByRole('listitem', { name: /^Page/ });
  await expect(page.getByText(/^\d+ pages\.$/)).toBeVisible();
  await expect(sheets.nth(0)).toContainText('Invented Name');
  await expect(sheets.nth(0)).toContainText('© 2026 Invented Name');
  await expect(sheets.nth(0)).toContainText('Log drum (shared with');
  await expect(sheets.nth(0)).toContainText('let it ring');
  await expect(sheets.nth(1).locator('[data-dynamic="pp"]').first()).toBeAttached();
  await expect(sheets.nth(1).locator('[data-let-ring]').first()).toBeAttached();
  await page.getByLabel('What').selectOption({ label: 'Part of Ayo' });
  await expect(sheets.nth(0)).toContainText('Ayo');
});

test('by keyboard alone, at 360 px: a player for each instrument, and undone', async ({ page }) => {
  await page.setViewportSize({ width: 360, height: 740 });
  await page.goto('/');
  await page.getByRole('button', { name: 'Start a study' }).first().focus();
  await page.keyboard.press('Enter');
  const players = page.getByRole('region', { name: 'Players' });
  await expect(players).toContainText('Nobody is named yet');
  await players.getByRole('button', { name: 'Give each instrument its own player' }).focus();
  await page.keyboard.press('Enter');
  await expect(players.getByRole('listitem')).toHaveCount(2);
  await players.getByRole('button', { name: 'What Player 1 plays' }).focus();
  await page.keyboard.press('Enter');
  await page.keyboard.press('Space');
  await page.keyboard.press('Escape');
  await expect(players).toContainText('plays nothing yet');
  await page.keyboard.press('Control+z');
  await expect(players).not.toContainText('plays nothing yet');
  const width = await page.evaluate(() => document.documentElement.scrollWidth);
  expect(width).toBeLessThanOrEqual(360);
});
