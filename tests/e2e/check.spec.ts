import type { Page } from '@playwright/test';
import type { Step } from '../../engine';
import { expect, test } from '../helpers/browser';
import { midi, midiTrack, mxl } from '../helpers/music-files';
import { alert } from './open';

const S = '3/8 1/8 (1/4) 1/4';
const by = (factor: string): Step => ({ kind: 'augment', factor });
const reverse = (how: 'values' | 'attacks'): Step => ({ kind: 'retrograde', by: how });
const turn = (steps: number): Step => ({ kind: 'rotate', steps, by: 'values' });
const add = (amount: string): Step => ({ kind: 'add', amount });
const address = (subject: string, steps: Step[], answer: string, metre = '4/4') => `/check?${new URLSearchParams({ subject, steps: JSON.stringify(steps), answer, metre })}`;
const verdict = (page: Page) => page.getByRole('region', { name: /./ }).filter({ has: page.getByTestId('marks') });

/** Every mistake that the checker names, as somebody would make it, and the words that must stand on the page. */
const MISTAKES: readonly (readonly [words: string, steps: Step[], answer: string])[] = [
  ['The factor is upside down', [by('3/2')], '1/4 1/12 (1/6) 1/6'],
  ['Everything is stretched, but by another factor', [by('3/2')], '9/8 3/8 (3/4) 3/4'],
  ['The attacks are stretched, the rests are not', [by('2')], '3/4 1/4 (1/4) 1/2'],
  ['Only the rests are stretched', [by('2')], '3/8 1/8 (1/2) 1/4'],
  ['This is the subject itself', [reverse('values')], S],
  ['The values are not stretched', [by('2'), reverse('values')], '1/4 (1/4) 1/8 3/8'],
  ['The order is not reversed', [by('2'), reverse('values')], '3/4 1/4 (1/2) 1/2'],
  ['The attacks are reversed, not the values', [reverse('values')], '1/8 (1/4) 3/8 1/4'],
  ['The values are reversed, not the attacks', [reverse('attacks')], '1/4 (1/4) 1/8 3/8'],
  ['It is rotated the other way', [turn(1)], '1/4 3/8 1/8 (1/4)'],
  ['It is rotated one too far', [turn(1)], '(1/4) 1/4 3/8 1/8'],
  ['It is rotated one too little', [turn(2)], '1/8 (1/4) 1/4 3/8'],
  ['It is not rotated', [by('2'), turn(1)], '3/4 1/4 (1/2) 1/2'],
  ['It is rotated by attacks, not by values', [turn(2)], '1/4 3/8 1/8 (1/4)'],
  ['The amount is taken the other way', [add('1/16')], '5/16 1/16 (1/4) 3/16'],
  ['The amount is added to the rests too', [add('1/16')], '7/16 3/16 (5/16) 5/16'],
  ['The amount is not added', [by('2'), add('1/16')], '3/4 1/4 (1/2) 1/2'],
  ['The steps are taken in another order', [turn(1), reverse('values')], '(1/4) 1/8 3/8 1/4'],
  ['It is right in another unit', [reverse('values')], '1/2 (1/2) 1/4 3/4'],
  ['One value is wrong', [by('2')], '3/4 1/4 (1/2) 3/8'],
  ['A value is missing', [by('2')], '3/4 (1/2) 1/2'],
  ['A value is too many', [by('2')], '3/4 1/4 1/8 (1/2) 1/2'],
  ['A rest stands for an attack, or an attack for a rest', [by('2')], '3/4 1/4 1/2 1/2'],
  ['A value that is held on is struck again', [by('2')], '1/2 1/4 1/4 (1/2) 1/2'],
  ['Values that are struck are held as one', [by('2')], '1 (1/2) 1/2'],
];

test('every mistake that is recognised stands on the page in words, with the habit that avoids it', async ({ page }) => {
  test.setTimeout(180_000);
  for (const [words, steps, answer] of MISTAKES) {
    await page.goto(address(S, steps, answer));
    await expect(page.getByTestId('marks')).toBeVisible();
    await expect(verdict(page).getByRole('status'), `${words}: ${answer}`).toContainText(words);
  }
});

test('by attacks, and a measure that does not add up', async ({ page }) => {
  await page.goto(address(S, [{ kind: 'rotate', steps: 2, by: 'attacks' }], '(1/4) 1/4 3/8 1/8'));
  await expect(verdict(page).getByRole('status')).toContainText('It is rotated by values');
  await page.goto(address('1/4 1/4 1/2 1/2 1/2', [], '1/4 1/4 | 1/2 1/2 1/2'));
  await expect(verdict(page).getByRole('status')).toContainText('A measure does not add up');
  await expect(verdict(page).getByRole('status')).toContainText('Measure 1 lasts 1/2; in 4/4 it should last 1.');
});

test('marks value by value', async ({ page }) => {
  await page.goto(address('1/4 1/8 1/8 1/2', [by('2')], '1/2 1/4 3/8 1'));
  await page.getByText('Marks value by value').click();
  await expect(page.getByRole('row')).toHaveText(['ValueShould beYoursMark', '11/21/2right, 1 mark', '21/41/4right, 1 mark', '31/43/8wrong length', '411right, 1 mark']);
});

test('the wrong place stands out on the staff', async ({ page }) => {
  await page.goto(address('1/4 1/8 1/8 1/2', [by('2')], '1/2 1/4 3/8 1'));
  const wrong = page.getByTestId('rhythm-staff').nth(1).locator('[data-origin].wrong');
  await expect(wrong).not.toHaveCount(0);
  expect(new Set(await wrong.evaluateAll((notes) => notes.map((note) => note.getAttribute('data-origin'))))).toEqual(new Set(['2']));
});

test('spelling is told apart from the marks', async ({ page }) => {
  await page.goto(address('3/8 1/8 1/2', [], '1/4+1/8 1/8 1/2'));
  await expect(page.getByRole('heading', { name: 'Right', exact: true })).toBeVisible();
  await expect(page.getByTestId('marks')).toHaveText('3 of 3 values');
  await expect(page.getByTestId('spelling')).toContainText('Value 1, of 3/8, is tied together from 2 parts; here one does.');
});

test('typed with the keyboard alone: a right answer, then one slip, read out with its place and its marks', async ({ page }) => {
  await page.goto('/check');
  await page.getByRole('textbox', { name: 'Your answer' }).focus();
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type('3/4 3/8 3/16 3/16 (3/8) 3/8 3/16 9/16');
  await expect(page.getByRole('heading', { name: 'Right', exact: true })).toBeVisible();
  await expect(page.getByTestId('marks')).toHaveText('8 of 8 values');
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type('3/4 3/8 3/16 1/4 (3/8) 3/8 3/16 9/16');
  await expect(page.getByTestId('marks')).toHaveText('7 of 8 values');
  // What a screen reader is told: the region that is read out when it changes.
  await expect(verdict(page).getByRole('status')).toHaveText(/One value is wrong.*Measure 2, beat 2 1\/4, value 4, 3\/16 was expected, 1\/4 is given\. Check each value/i);
  await expect(page.getByRole('img', { name: /^Should be: 3\/4 3\/8 3\/16 3\/16 \(3\/8\) 3\/8 3\/16 9\/16\. Yours: / })).toBeVisible();
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type('3/4 zwei');
  await expect(alert(page)).toContainText('zwei');
});

test('steps are chosen in the sentence, kept in the address, and worked through forwards and backwards', async ({ page }) => {
  await page.goto('/check');
  await page.getByRole('button', { name: /^What should be done to it/ }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('combobox', { name: 'What is done' }).selectOption('rotate');
  await dialog.getByRole('textbox', { name: 'By how much' }).fill('2');
  await dialog.getByRole('button', { name: 'Add a step' }).click();
  await page.keyboard.press('Escape');
  await expect(page.getByTestId('check-sentence')).toHaveText('The answer should be the subject its values reversed, then stretched 3/2 times, then rotated by 2 values.');
  await expect(page).toHaveURL(/rotate/);
  await page.reload();
  await expect(page.getByTestId('check-sentence')).toContainText('then rotated by 2 values');
  await page.getByText('Worked step by step').click();
  const now = page.getByRole('status').filter({ hasText: /^(The subject|Step)/ });
  await expect(now).toHaveText('The subject, as it is.');
  await page.getByRole('button', { name: 'Next step' }).click();
  await expect(now).toContainText('Step 1: its values reversed. It is now 1/2 1/4 1/8 1/8 (1/4) 1/4 1/8 3/8.');
  await page.getByRole('button', { name: 'Next step' }).click();
  await expect(now).toContainText('Step 2: stretched 3/2 times.');
  await page.getByRole('button', { name: 'Step back' }).click();
  await expect(now).toContainText('Step 1');
});

test('the subject, the key and the answer can be heard', async ({ page }) => {
  await page.goto('/check');
  for (const name of ['the subject', 'what it should be', 'the answer']) {
    await page.getByRole('button', { name: `Hear ${name}` }).click();
    await expect(page.getByRole('button', { name: 'Stop' })).toBeVisible();
    await page.getByRole('button', { name: 'Stop' }).click();
    await expect(page.getByRole('button', { name: `Hear ${name}` })).toBeVisible();
  }
});

test('what was done to it: found exactly, or explained as near as can be', async ({ page }) => {
  await page.goto(`/check?${new URLSearchParams({ mode: 'find', from: '3/8 1/8 1/4 1/4', to: '1/2 1/2 1/4 3/4' })}`);
  const found = page.getByRole('region', { name: 'From the first to the second' });
  await expect(found.getByRole('listitem').first()).toHaveText('stretched 2 times, then its values reversed');
  await page.getByRole('textbox', { name: 'Second rhythm' }).fill('1/2 1/2 1/4 5/8');
  await expect(found).toContainText('No one transformation gives it.');
  await expect(found).toContainText('The longest stretch that one does explain: values 1 to 3, stretched 2 times, then its values reversed.');
  await page.getByRole('radio', { name: 'Is this right?' }).check();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Check a worked transformation');
});

test('the open API: every example runs on its page', async ({ page }) => {
  await page.goto('/open-api');
  const asks = page.getByRole('button', { name: 'Ask' });
  const count = await asks.count();
  expect(count).toBe(9);
  for (let index = 0; index < count; index += 1) {
    await asks.nth(index).click();
    await expect(page.getByLabel('Answer')).toHaveCount(index + 1);
  }
  await page.getByRole('textbox', { name: 'Body' }).first().fill('{');
  await asks.first().click();
  await expect(page.getByText('This is no JSON.')).toBeVisible();
});

test('an answer is written on the staff alone, and what is written there is the text', async ({ page }) => {
  await page.goto(address('1/4 1/8 1/8 1/2', [by('2')], '1/2'));
  await page.getByRole('button', { name: 'Write on the staff: Your answer' }).click();
  const pad = page.getByRole('group', { name: 'Your answer, on the staff' });
  const answer = page.getByRole('textbox', { name: 'Your answer' });
  await pad.getByRole('radio', { name: 'quarter', exact: true }).check();
  await pad.getByRole('button', { name: 'Put in', exact: true }).click();
  await pad.getByRole('button', { name: 'Put in', exact: true }).click();
  await pad.getByRole('radio', { name: 'half' }).check();
  await pad.getByRole('button', { name: 'Put in', exact: true }).click();
  await expect(answer).toHaveValue('1/2 1/4 1/4 1/2');
  await expect(page.getByTestId('marks')).toHaveText('3 of 4 values');
  await pad.getByRole('button', { name: 'Tie to the one before' }).click();
  await expect(answer).toHaveValue('1/2 1/4 1/4 1');
  await expect(page.getByRole('heading', { name: 'Right', exact: true })).toBeVisible();
  // A note that is pressed is the place; a triplet rest goes in its place.
  await pad.locator('[data-origin="1"]').first().click();
  await expect(pad.getByRole('status')).toHaveText('At value 2 of 4: 1/4.');
  await pad.getByRole('checkbox', { name: 'rest' }).check();
  await pad.getByRole('radio', { name: 'of three' }).check();
  await pad.getByRole('button', { name: 'Put in its place' }).click();
  await expect(answer).toHaveValue('1/2 (1/3) 1/4 1');
  await pad.getByRole('button', { name: 'Take away' }).click();
  await expect(answer).toHaveValue('1/2 (1/3) 1');
});

test('an answer comes from a file: rhythm text, MusicXML with a choice of lines, and what is wrong with one', async ({ page }) => {
  await page.goto(address('1/4 1/8', [by('2')], '1/2'));
  const answer = page.getByRole('textbox', { name: 'Your answer' });
  const input = page.getByLabel('From a file: Your answer');
  await input.setInputFiles({ name: 'answer.txt', mimeType: 'text/plain', buffer: Buffer.from('½ ¼\n') });
  await expect(answer).toHaveValue('1/2 1/4');
  await expect(page.getByRole('heading', { name: 'Right', exact: true })).toBeVisible();
  const part = (id: string, duration: number) => `<part id="${id}"><measure number="1"><attributes><divisions>2</divisions></attributes><note><unpitched/><duration>${duration}</duration></note></measure></part>`;
  const xml = `<score-partwise><part-list><score-part id="P1"><part-name>Claves</part-name></score-part><score-part id="P2"><part-name>Bongos</part-name></score-part></part-list>${part('P1', 4)}${part('P2', 3)}</score-partwise>`;
  await input.setInputFiles({ name: 'two.musicxml', mimeType: 'application/xml', buffer: Buffer.from(xml) });
  await page.getByRole('button', { name: 'Bongos' }).click();
  await expect(answer).toHaveValue('3/8');
  await input.setInputFiles({ name: 'two.mxl', mimeType: 'application/octet-stream', buffer: Buffer.from(mxl(xml)) });
  await page.getByRole('button', { name: 'Claves' }).click();
  await expect(answer).toHaveValue('1/2');
  await input.setInputFiles({ name: 'one.mid', mimeType: 'audio/midi', buffer: Buffer.from(midi([midiTrack([[0, 720]])])) });
  await expect(answer).toHaveValue('3/8');
  await input.setInputFiles({ name: 'bad.xml', mimeType: 'application/xml', buffer: Buffer.from('<!DOCTYPE a [<!ENTITY x "y">]><a>&x;</a>') });
  await expect(alert(page)).toContainText('This file defines entities of its own');
  await expect(answer).toHaveValue('3/8');
});
