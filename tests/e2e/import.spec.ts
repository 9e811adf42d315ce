import type { Page } from '@playwright/test';
import { expect, test } from '../helpers/browser';
import { attributes, bytesOf, midi, midiTrack, musicXML, mxl, note, rest } from '../helpers/music-files';
import { alert, openStudy, sentence } from './open';

const D = attributes(12);
const part = (id: string, measures: readonly string[]) => `<part id="${id}">${measures.map((text, index) => `<measure number="${index + 1}">${text}</measure>`).join('')}</part>`;
/** Two parts; the first has two voices, a grace note and triplets. */
const SCORE = musicXML(
  [D + note(24, '<voice>1</voice>') + note(8, '<voice>1</voice>') + note(8, '<voice>1</voice>') + note(8, '<voice>1</voice>') + '<backup><duration>48</duration></backup>' + note(48, '<voice>2</voice>'), '<note><grace/><unpitched/><voice>1</voice></note>' + note(36, '<voice>1</voice>') + note(12, '<voice>1</voice>'), note(48, '<voice>1</voice>')],
  { name: 'Log drum', parts: part('P2', [D + note(12) + rest(36), note(48), note(24) + rest(24)]) },
);
const panel = (page: Page) => page.getByRole('region', { name: 'Bring in music' });
const input = (page: Page) => panel(page).locator('input[type=file]');
const dialogue = (page: Page) => panel(page).getByRole('button', { name: 'choose a file' });
const file = (name: string, bytes: Uint8Array) => ({ name, mimeType: '', buffer: Buffer.from(bytes) });
const choose = (page: Page, name: string, bytes: Uint8Array) => input(page).setInputFiles(file(name, bytes));
const subjectText = (page: Page) => page.getByRole('textbox', { name: /^Lengths in whole notes/ });
const bring = (page: Page) => panel(page).getByRole('button', { name: 'Bring it in' }).click();

/** As a file manager does it: the file is held over the page, then let go. */
async function drop(page: Page, name: string, bytes: Uint8Array): Promise<void> {
  const data = await page.evaluateHandle(([called, numbers]) => {
    const transfer = new DataTransfer();
    transfer.items.add(new File([new Uint8Array(numbers)], called));
    return transfer;
  }, [name, [...bytes]] as [string, number[]]);
  await page.dispatchEvent('body', 'dragover', { dataTransfer: data });
  await expect(page.getByText(/^Let go to /)).toBeVisible();
  await page.dispatchEvent('body', 'drop', { dataTransfer: data });
}

test('a dropped score: its lines, a range, warnings, a new subject that a section states; undone in one step', async ({ page }) => {
  await openStudy(page);
  const before = await subjectText(page).inputValue();
  await drop(page, 'ferry.mxl', mxl(SCORE));
  await expect(panel(page).getByRole('status')).toHaveText('ferry.mxl holds 3 lines.');
  await expect(panel(page).getByRole('radio', { name: /Log drum, voice 1 1\/2 1\/6 1\/6 1\/6 3\/4 1\/4 …/ })).toBeChecked();
  await expect(panel(page).getByRole('list', { name: 'What was left out or supposed' })).toContainText('Grace notes were left out (measure 2).');
  await panel(page).getByRole('textbox', { name: 'From measure' }).fill('2');
  await panel(page).getByRole('textbox', { name: 'To measure' }).fill('9');
  await expect(alert(page)).toHaveText('There is no measure “9”: this line has measures 1 to 3.');
  await panel(page).getByRole('textbox', { name: 'To measure' }).fill('3');
  await expect(panel(page).getByTestId('taken')).toHaveText('3 values, 3 attacks, 2 whole notes = 2 measures of 4/4.');
  await expect(panel(page).getByTestId('rhythm-staff').locator('.vf-stavenote').first()).toBeAttached();
  await bring(page);
  await expect(panel(page).getByRole('status')).toHaveText('“Log drum, voice 1” is now a subject, stated in “Filling”. Undo takes it back.');
  await expect(subjectText(page)).toHaveValue('3/4 1/4 1');
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(subjectText(page)).toHaveValue(before);
});

test('by the file dialogue: in place of a subject; MIDI held to the next attack, as an episode; then a line of it', async ({ page }) => {
  await openStudy(page);
  const chooser = page.waitForEvent('filechooser');
  await dialogue(page).click();
  await (await chooser).setFiles(file('ferry.musicxml', bytesOf(SCORE)));
  await panel(page).getByRole('radio', { name: /^Part 2/ }).check();
  await panel(page).getByRole('radio', { name: 'The subject “Subject”, in place of what it is' }).check();
  await bring(page);
  await expect(subjectText(page)).toHaveValue('1/4 (3/4) 1 1/2 (1/2)');

  const hits = [0, 1, 2, 3].map((n) => [n * 480, 60, n === 2 ? 40 : 36] as const);
  await choose(page, 'kit.mid', midi([midiTrack(hits, { name: 'Kit', end: 1_920 })]));
  await expect(panel(page).getByTestId('taken')).toContainText('8 values, 4 attacks');
  await panel(page).getByRole('checkbox', { name: 'Hold each attack until the next' }).check();
  await expect(panel(page).getByTestId('taken')).toContainText('4 values, 4 attacks');
  await panel(page).getByRole('radio', { name: 'A line of a new episode after “Filling”' }).check();
  await panel(page).getByRole('combobox', { name: 'Instrument' }).selectOption('Flower pots');
  await bring(page);
  await expect(page.getByRole('heading', { name: 'How “Kit” is made' })).toBeVisible();
  await expect(page.getByRole('textbox', { name: 'Flower pots, as rhythm text' })).toHaveValue('1/4@1 1/4@1 1/4@2 1/4@1');

  await choose(page, 'ferry.musicxml', bytesOf(SCORE));
  await expect(panel(page).getByRole('radio', { name: 'A line of “Kit”' })).toBeChecked();
  await panel(page).getByRole('combobox', { name: 'Instrument' }).selectOption('Tam-tam');
  await bring(page);
  await expect(page.getByRole('textbox', { name: 'Tam-tam, as rhythm text' })).toHaveValue('1/2 1/6 1/6 1/6 3/4 1/4 1');
});

test('by paste: into its field, and anywhere on the page', async ({ page }) => {
  await openStudy(page, 'footbridge');
  await panel(page).getByRole('button', { name: 'paste text' }).click();
  await panel(page).getByRole('textbox', { name: 'MusicXML or rhythm text' }).fill('¼, ⅛ (⅛) 1/2');
  await panel(page).getByRole('button', { name: 'Read it' }).click();
  await expect(panel(page).getByRole('heading', { name: 'Pasted text' })).toBeFocused();
  await panel(page).getByRole('textbox', { name: 'Name' }).fill('Plank');
  await bring(page);
  await expect(panel(page).getByRole('status')).toContainText('“Plank” is now a subject');
  await page.evaluate((text) => {
    const data = new DataTransfer();
    data.setData('text', text);
    document.body.dispatchEvent(new ClipboardEvent('paste', { clipboardData: data, bubbles: true }));
  }, SCORE);
  await expect(panel(page).getByRole('status')).toHaveText('Pasted text holds 3 lines.');
});

test('by the keyboard alone, 360 px wide', async ({ page }) => {
  await page.setViewportSize({ width: 360, height: 780 });
  // Asked for before the page opens: the browser must know by then that the dialogue is the test's.
  const chooser = page.waitForEvent('filechooser');
  await openStudy(page);
  await dialogue(page).focus();
  await page.keyboard.press('Enter');
  await (await chooser).setFiles(file('ferry.musicxml', bytesOf(SCORE)));
  await expect(panel(page).getByRole('heading', { name: 'Choose a line' })).toBeFocused();
  await page.keyboard.press('Tab');
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('ArrowDown');
  await expect(panel(page).getByRole('radio', { name: /^Part 2/ })).toBeChecked();
  await page.keyboard.press('Tab');
  await expect(panel(page).getByRole('textbox', { name: 'From measure' })).toBeFocused();
  await page.keyboard.press('Tab');
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type('1');
  await expect(panel(page).getByTestId('taken')).toContainText('2 values, 1 attack, 1 whole note = 1 measure of 4/4');
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(360);
  await panel(page).getByRole('textbox', { name: 'Name' }).focus();
  await page.keyboard.press('Enter');
  await expect(panel(page).getByRole('status')).toContainText('“Part 2” is now a subject, stated in “Filling”.');
});

test('wrong files get their sentence, and the study stays', async ({ page }) => {
  await openStudy(page);
  const before = await subjectText(page).inputValue();
  const WRONG: readonly (readonly [string, Uint8Array, string])[] = [
    ['laughs.xml', bytesOf('<!DOCTYPE a [<!ENTITY x "ha">]><a>&x;</a>'), 'laughs.xml: This file defines entities of its own'],
    ['way-out.mxl', mxl(SCORE, { '../../x': bytesOf('x') }), 'points out of the file'],
    ['half.musicxml', bytesOf(SCORE.slice(0, 500)), 'This MusicXML is cut off'],
    ['silent.musicxml', bytesOf(musicXML([D + rest(48)])), 'This file holds no attack in any part.'],
    ['picture.png', new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0xff]), 'This is no file of music that can be read.'],
    ['study.json', bytesOf('{"title":"Half'), 'This study was not opened. It is no JSON that can be read'],
    ['other.json', bytesOf('{"title":"Weir","colour":"blue","metre":"4/4","tempo":{"beat":"1/4","perMinute":"60"},"instruments":[],"sections":[{"id":"a","name":"A","role":"other","kind":"free","lines":[]}]}'), '“colour” in the study is not known to this version.'],
  ];
  for (const [name, bytes, words] of WRONG) {
    await choose(page, name, bytes);
    await expect(alert(page)).toContainText(words);
  }
  await expect(subjectText(page)).toHaveValue(before);
});

test('a long file can be given up', async ({ page }) => {
  await openStudy(page);
  const long = musicXML(Array.from({ length: 40_000 }, (_, n) => (n === 0 ? D : '') + note(24) + note(24)));
  await choose(page, 'long.musicxml', bytesOf(long));
  await panel(page).getByRole('button', { name: 'Cancel' }).click();
  await expect(panel(page).getByRole('button', { name: 'Cancel' })).toHaveCount(0);
  await expect(panel(page).getByRole('status')).toHaveText('');
  await choose(page, 'short.musicxml', bytesOf(SCORE));
  await expect(panel(page).getByRole('status')).toHaveText('short.musicxml holds 3 lines.');
});

test('a study’s own file opens as a new study, nothing lost: from the list and from a study', async ({ page }) => {
  const document = await (await page.request.get('/api/studies/footbridge/score.json')).text();
  await page.goto('/studies');
  await expect(page.getByRole('link', { name: 'Footbridge' })).toBeVisible();
  await drop(page, 'footbridge.json', bytesOf(document));
  await expect(page).toHaveURL(/\/studies\/draft-/);
  await expect(sentence(page)).toBeVisible();
  const kept = await page.evaluate(() => JSON.parse(localStorage.getItem(`sesqui.draft.${location.pathname.split('/').at(-1)}`)!).document as unknown);
  expect(kept).toEqual(JSON.parse(document));
  await choose(page, 'footbridge.json', bytesOf(document.replace('"title": "', '"title": "Another ')));
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Another');
  await page.goto('/studies');
  await page.locator('input[type=file]').setInputFiles(file('ferry.musicxml', bytesOf(SCORE)));
  await expect(alert(page)).toContainText('ferry.musicxml is music, not a study.');
});
