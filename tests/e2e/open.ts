import type { Page } from '@playwright/test';
import { demoAccounts } from '../../db/demo/accounts';
import { newAddress } from '../helpers/api';
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

/** A person of a test's own, known to nobody else. */
export const invent = () => ({ name: 'Iva Towpath', email: `iva-${crypto.randomUUID()}@sesqui.example`, password: 'seven wooden lock gates' });
export type Invented = ReturnType<typeof invent>;

/** Accounts are counted by address: each of these pages seems to come from an address of its own. */
export const fromNewAddress = (page: Page): Promise<void> => page.setExtraHTTPHeaders({ 'x-forwarded-for': newAddress() });

/** Signs in by the page, wherever it then leads. */
export async function signInAs(page: Page, { email, password }: Pick<Invented, 'email' | 'password'>): Promise<void> {
  await page.getByRole('textbox', { name: 'E-mail' }).fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}

/** Makes an account by the page, and signs in with it. */
export async function register(page: Page, role: 'Composer' | 'Teacher' | 'Student' = 'Composer', person = invent()): Promise<Invented> {
  await fromNewAddress(page);
  await page.goto('/register');
  await page.getByRole('textbox', { name: 'Name' }).fill(person.name);
  await page.getByRole('textbox', { name: 'E-mail' }).fill(person.email);
  await page.getByLabel('Password').fill(person.password);
  await page.getByRole('radio', { name: new RegExp(`^${role}`) }).check();
  await page.getByRole('button', { name: 'Make an account' }).click();
  await expect(page).toHaveURL(/\/sign-in\?registered=1/);
  await signInAs(page, person);
  await expect(page).toHaveURL(/\/studies$/);
  return person;
}

/** Signs out by the header, and waits until it is done. */
export async function signOut(page: Page): Promise<void> {
  await page.getByRole('banner').getByRole('button', { name: 'Sign out' }).click();
  await expect(page.getByRole('link', { name: 'Sign in' })).toBeVisible();
}
