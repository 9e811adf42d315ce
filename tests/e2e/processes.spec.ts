import type { Page } from '@playwright/test';
import { expect, test } from '../helpers/browser';
import { alert, drawnScore, sentence, word } from './open';

async function begin(page: Page): Promise<void> {
  await page.goto('/');
  await page.getByRole('button', { name: 'Start a study' }).first().click();
  await expect(sentence(page)).toBeVisible();
}

async function choose(page: Page, process: RegExp): Promise<void> {
  await word(page, 'Process').click();
  await page.getByRole('dialog', { name: 'Process' }).getByRole('radio', { name: process }).check();
  await page.keyboard.press('Escape');
}

/** Opens a word by the name of what it stands for, types and sets. */
async function set(page: Page, label: string, text: string): Promise<void> {
  await word(page, label).click();
  const dialog = page.getByRole('dialog', { name: label });
  await dialog.getByRole('textbox').fill(text);
  await dialog.getByRole('button', { name: 'Set' }).click();
}

test.beforeEach(async ({ page }) => begin(page));

test('a phase piece is pages, not a book: its repeats are printed once, and every one is counted', async ({ page }) => {
  await choose(page, /^shifted against itself/);
  await expect(sentence(page)).toHaveText('The subject is shifted against itself: claves keeps to it, frame drum enters it later by 1 pulse of 1/8 after every 4 times through, shifted 4 times, forwards.');
  await set(page, 'Times through before each shift', '12');
  await set(page, 'Number of shifts', '16');
  await expect(sentence(page)).toContainText('after every 12 times through, shifted 16 times');
  // 17 blocks of 12 subjects of 2 measures
  await expect(page.getByTestId('facts')).toContainText('408 measures');
  const systems = await drawnScore(page);
  expect(await systems.count()).toBeLessThan(20);
  await expect(page.getByTestId('times').first()).toHaveText('12 times');
  await page.getByRole('button', { name: /^Undo/ }).click();
  await expect(sentence(page)).toContainText('shifted 4 times');
});

test('rotation, by a value, by an attack and by a pulse', async ({ page }) => {
  await choose(page, /^rotated/);
  await set(page, 'Number of statements', '5');
  await expect(sentence(page)).toHaveText('The subject is rotated by 1 value from each statement to the next, stated 5 times, one after another, forwards, by claves and frame drum.');
  await word(page, 'What a step is').click();
  const dialog = page.getByRole('dialog', { name: 'What a step is' });
  await dialog.getByRole('radio', { name: 'an attack, with the rests after it' }).check();
  await expect(sentence(page)).toContainText('rotated by 1 attack from each');
  await dialog.getByRole('radio', { name: 'a pulse' }).check();
  await dialog.getByRole('textbox').fill('0');
  await dialog.getByRole('button', { name: 'Set' }).click();
  await expect(alert(page)).toBeVisible();
  await dialog.getByRole('textbox').fill('3/8');
  await dialog.getByRole('button', { name: 'Set' }).click();
  await expect(sentence(page)).toContainText('rotated by 1 pulse of 3/8 from each');
});

test('filling-in: the order is typed from 1; what is not there, and what is named twice, is said', async ({ page }) => {
  await choose(page, /^filled in/);
  for (const [text, message] of [
    ['1, 8', 'The subject has 7 attacks; there is no attack 8 to fill in.'],
    ['2, 2', 'Attack 2 is filled in twice. Name each attack once.'],
    ['0', '“0” is no number of an attack. Attacks count from 1.'],
  ]) {
    await word(page, 'Order of attacks').click();
    const dialog = page.getByRole('dialog', { name: 'Order of attacks' });
    await dialog.getByRole('textbox').fill(text!);
    await dialog.getByRole('button', { name: 'Set' }).click();
    await expect(dialog.getByRole('alert')).toHaveText(message!);
    await page.keyboard.press('Escape');
  }
  await set(page, 'Order of attacks', '7 3 1');
  await expect(sentence(page)).toContainText('in the order 7, 3, 1, each stage twice');
});

test('additive, cycle and resultant, each by its words', async ({ page }) => {
  await choose(page, /^built up/);
  await word(page, 'Direction').click();
  await page.getByRole('dialog').getByRole('radio', { name: 'shrinking' }).check();
  await page.keyboard.press('Escape');
  await expect(sentence(page)).toContainText('The subject is taken down value by value, shrinking, with its beginning in every stage');

  await choose(page, /^passed from hand to hand/);
  await word(page, 'Colour: the instruments in turn').click();
  await page.getByRole('dialog').getByRole('button', { name: 'Add one more' }).click();
  await page.keyboard.press('Escape');
  await expect(sentence(page)).toContainText('through claves, frame drum and claves, until both end together');
  // 7 attacks and 3 colours: after three rounds
  await expect(page.getByText(/^Statement 3 of 3, /)).toBeVisible();

  await choose(page, /^two steady pulses/);
  await set(page, 'First pulse, in units', '5');
  await expect(sentence(page)).toHaveText('A pulse of 5 and one of 2, in units of 1/8, are heard as one rhythm, by claves. Waiting for a statement: frame drum.');
});

test('what is done to the subject first is a chain of its own', async ({ page }) => {
  await page.getByRole('button', { name: /First change the subject/ }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('combobox', { name: 'What is done' }).selectOption('values');
  await dialog.getByRole('button', { name: 'Add a step' }).click();
  await expect(sentence(page)).toContainText('The subject, first its values reversed, is stated');
  await word(page, 'First changed').click();
  const open = page.getByRole('dialog', { name: 'First changed' });
  await open.getByRole('combobox', { name: 'What is done' }).selectOption('augment');
  await open.getByRole('textbox', { name: 'By how much' }).fill('3/2');
  await open.getByRole('button', { name: 'Add a step' }).click();
  await expect(sentence(page)).toContainText('first its values reversed and stretched 3/2 times, is stated');
  await open.getByRole('button', { name: 'Take step 1 away' }).click();
  await expect(sentence(page)).toContainText('The subject, first stretched 3/2 times, is stated');
});
