import type { Page } from '@playwright/test';
import { demoAccounts } from '../../db/demo/accounts';
import { expect } from '../helpers/browser';

/** Opens a study and waits until its sentence stands. */
export async function openStudy(page: Page, id = 'lock-gates'): Promise<void> {
  await page.goto(`/studies/${id}`);
  await expect(page.getByTestId('process-sentence')).toBeVisible();
}

/** The words of the sentence, as they are read. */
export const sentence = (page: Page) => page.getByTestId('process-sentence');

/** A word of the sentence, by what it stands for. */
export const word = (page: Page, label: string, nth = 0) => sentence(page).getByRole('button', { name: new RegExp(`^${label}: `) }).nth(nth);

/** Opens a word, types into its field and sets it. */
export async function setWord(page: Page, label: string, text: string): Promise<void> {
  await word(page, label).click();
  const dialog = page.getByRole('dialog', { name: label });
  await dialog.getByRole('textbox').fill(text);
  await dialog.getByRole('button', { name: 'Set' }).click();
}

/** Waits until the first systems of the score are drawn, and gives the drawing. */
export async function drawnScore(page: Page) {
  const systems = page.getByRole('region', { name: /^Staves/ }).getByTestId('system');
  await systems.first().scrollIntoViewIfNeeded();
  await expect(systems.first().locator('svg').first()).toBeVisible();
  await expect(systems.first().locator('.vf-stavenote').first()).toBeAttached();
  return systems;
}

/** What the page says is wrong; the framework's own announcer of routes is not meant. */
export const alert = (page: Page) => page.locator('[role="alert"]:not(#__next-route-announcer__)');

/** Signs in with the demo account of a role, by the page, and waits for the list of studies. */
export async function signIn(page: Page, role: (typeof demoAccounts)[number]['role']): Promise<void> {
  const { email, password } = demoAccounts.find((one) => one.role === role)!;
  await page.goto('/sign-in');
  await page.getByRole('textbox', { name: 'E-mail' }).fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).toHaveURL(/\/studies$/);
}
