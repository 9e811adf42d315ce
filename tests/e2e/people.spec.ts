import { expect, forgetRefusals, test } from '../helpers/browser';
import { openStudy, register, signIn, signInAs } from './open';

test('an administrator finds a person, changes the role, closes the account and opens it; the work is not shown', async ({ page, browser, complaints }) => {
  const theirs = await (await browser.newContext()).newPage();
  const person = await register(theirs, 'Student');
  await openStudy(theirs, 'footbridge');
  await theirs.getByRole('button', { name: 'Keep as my study' }).click();
  await expect(theirs).toHaveURL(/\/studies\/[0-9a-f]{8}-/);
  const study = theirs.url();

  await signIn(page, 'administrator');
  await page.getByRole('link', { name: 'People' }).click();
  await page.getByLabel('Find by name or address').fill(person.email.slice(0, 20));
  const row = page.getByRole('row').filter({ hasText: person.email });
  await expect(row).toBeVisible();
  await expect(page.getByRole('row')).toHaveCount(2);
  await expect(page.getByRole('main')).not.toContainText('Footbridge');

  await row.getByRole('combobox').selectOption('teacher');
  await expect(row.getByRole('combobox')).toHaveValue('teacher');
  await theirs.goto('/studies');
  await expect(theirs.getByRole('banner')).toContainText('teacher');

  await row.getByRole('button', { name: /^Close the account/ }).click();
  await expect(row).toContainText('closed');
  await theirs.goto('/account');
  await expect(theirs).toHaveURL(/\/sign-in/);
  await signInAs(theirs, person);
  await expect(theirs.getByRole('alert').first()).toContainText('do not go together');

  await row.getByRole('button', { name: /^Open the account/ }).click();
  await expect(row.getByRole('cell', { name: 'open', exact: true })).toBeVisible();
  await signInAs(theirs, person);
  await expect(theirs.getByRole('heading', { name: 'Account' })).toBeVisible();

  // The administrator cannot open the work either.
  await page.goto(study);
  await expect(page.getByText('There is no such study, or it is not yours to open.')).toBeVisible();
  forgetRefusals(complaints);
  await theirs.context().close();
});

test('whoever is no administrator finds no such page, and no way to it', async ({ page, complaints }) => {
  await signIn(page, 'teacher');
  await expect(page.getByRole('link', { name: 'People' })).toHaveCount(0);
  const answer = await page.goto('/people');
  expect(answer?.status()).toBe(404);
  forgetRefusals(complaints);
});
