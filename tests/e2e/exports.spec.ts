import fs from 'node:fs';
import type { Download, Page } from '@playwright/test';
import { unzipSync } from 'fflate';
import { parseMidi } from 'midi-file';
import { demoStudies } from '../../db/demo';
import { parseStudy } from '../../engine';
import { expect, test } from '../helpers/browser';
import { readPdf } from '../helpers/read-pdf';
import { fromNewAddress, openStudy, register } from './open';

const lockGates = parseStudy(demoStudies.find(({ slug }) => slug === 'lock-gates')!.study);
const menu = (page: Page) => page.getByRole('dialog', { name: 'Export' });

async function openMenu(page: Page, id = 'lock-gates'): Promise<void> {
  await openStudy(page, id);
  await page.getByRole('button', { name: 'Export', exact: true }).click();
  await expect(menu(page)).toBeVisible();
}

const bytesOf = async (download: Download) => new Uint8Array(fs.readFileSync(await download.path()));

/** Takes one file from the menu, and waits until the page says that it is there. */
async function take(page: Page, name: string): Promise<{ name: string; bytes: Uint8Array; text: string }> {
  const [download] = await Promise.all([page.waitForEvent('download'), menu(page).getByRole('button', { name, exact: true }).click()]);
  const file = download.suggestedFilename();
  await expect(menu(page).getByRole('status')).toHaveText(`“${file}” is with your downloads.`);
  const bytes = await bytesOf(download);
  return { name: file, bytes, text: new TextDecoder().decode(bytes) };
}

test('everything in the menu is what it says', async ({ page }) => {
  await openMenu(page);
  const score = await take(page, 'Score as PDF');
  expect(score.name).toBe('Lock Gates.pdf');
  const read = await readPdf(score.bytes);
  expect(read.info.Title).toBe('Lock Gates');
  expect(read.texts.join(' ')).toContain('Lock Gates');
  expect(read.texts.at(-1)).toMatch(/Version 1, /);

  const part = await take(page, 'Part of Player 2 as PDF');
  expect(part.name).toBe('Lock Gates - Player 2.pdf');
  expect((await readPdf(part.bytes)).texts.join(' ')).toContain('Player 2');

  const parts = await take(page, 'All parts as zip of PDFs');
  const files = unzipSync(parts.bytes);
  expect(Object.keys(files).sort()).toEqual(lockGates.players.map(({ name }) => `Lock Gates - ${name}.pdf`));
  for (const { name } of lockGates.players) expect((await readPdf(files[`Lock Gates - ${name}.pdf`]!)).texts.join(' ')).toContain(name);

  const shape = (text: string) =>
    page.evaluate((xml) => {
      const root = new DOMParser().parseFromString(xml, 'application/xml').documentElement;
      return { root: root.nodeName, title: root.querySelector('work-title')?.textContent, parts: root.querySelectorAll('score-part').length, measures: root.querySelectorAll('part:first-of-type > measure').length };
    }, text);
  const xml = await take(page, 'Score as MusicXML');
  expect(xml.name).toBe('Lock Gates.musicxml');
  expect(await shape(xml.text)).toEqual({ root: 'score-partwise', title: 'Lock Gates', parts: lockGates.instruments.length, measures: 77 });
  const mxl = await take(page, 'Part of Player 2 as compressed MusicXML');
  expect(mxl.name).toBe('Lock Gates - Player 2.mxl');
  const packed = unzipSync(mxl.bytes);
  expect(await shape(new TextDecoder().decode(packed['score.musicxml']))).toMatchObject({ root: 'score-partwise', title: 'Lock Gates' });

  await expect(menu(page).getByText(/^Exact: every attack falls on a tick, [\d,]+ to a quarter\.$/)).toBeVisible();
  const midi = await take(page, 'MIDI file');
  expect(midi.name).toBe('Lock Gates.mid');
  expect(parseMidi(midi.bytes).tracks.length).toBe(lockGates.instruments.length + 1);

  const csv = await take(page, 'Statements as CSV');
  expect(csv.name).toBe('Lock Gates.csv');
  expect(csv.text.split('\r\n')[0]).toMatch(/^\uFEFF?Section,Statement,Instrument,/);

  const json = await take(page, 'The study as JSON');
  expect(json.name).toBe('Lock Gates.json');
  expect(JSON.parse(json.text)).toEqual(lockGates);
});

test('paper and staves are those that were chosen', async ({ page }) => {
  await openMenu(page);
  await menu(page).getByText('Letter', { exact: true }).click();
  await menu(page).getByText('Landscape', { exact: true }).click();
  await menu(page).getByLabel('Staff').selectOption('4');
  const { sizes } = await readPdf((await take(page, 'Score as PDF')).bytes);
  expect(sizes[0]).toEqual([0, 0, 792, 612]);
});

test('pictures stand alone: they parse, say what they show, and are drawn twice as fine', async ({ page }) => {
  await openMenu(page);
  for (const [name, file, title] of [
    ['Form', 'Lock Gates - form', 'The form of Lock Gates'],
    ['Threads', 'Lock Gates - Filling - threads', 'The threads of “Filling” in Lock Gates, from one start'],
  ] as const) {
    const svg = await take(page, `${name} as SVG`);
    expect(svg.name).toBe(`${file}.svg`);
    const seen = await page.evaluate((text) => {
      const { documentElement: root } = new DOMParser().parseFromString(text, 'image/svg+xml');
      const texts = [...root.querySelectorAll('text')].map((one) => one.textContent);
      return { name: root.nodeName, title: root.querySelector('title')?.textContent, described: (root.querySelector('desc')?.textContent ?? '').length, texts, width: Number(root.getAttribute('width')), height: Number(root.getAttribute('height')) };
    }, svg.text);
    expect(seen).toMatchObject({ name: 'svg', title });
    expect(seen.described).toBeGreaterThan(40);
    expect(seen.texts).toContain(name === 'Form' ? 'Emptying' : 'temple blocks');
    expect(svg.text).not.toMatch(/var\(|color-mix|https?:\/\/(?!www\.w3\.org\/2000\/svg)/);
    const png = Buffer.from((await take(page, `${name} as PNG`)).bytes);
    expect(png.subarray(1, 4).toString()).toBe('PNG');
    expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([Math.round(seen.width * 2), Math.round(seen.height * 2)]);
  }
});

test('what is not saved is printed as it stands, and says so', async ({ page }) => {
  await openStudy(page);
  await page.getByRole('button', { name: /^Title: / }).click();
  await page.getByRole('textbox', { name: 'Title' }).fill('Écluses – не сохранено');
  await page.getByRole('button', { name: 'Set' }).click();
  await page.getByRole('button', { name: 'Export', exact: true }).click();
  const { name, bytes } = await take(page, 'Score as PDF');
  expect(name).toBe('Écluses – не сохранено.pdf');
  const { texts, info } = await readPdf(bytes);
  expect(info.Title).toBe('Écluses – не сохранено');
  expect(texts.join('').replaceAll(' ', '')).toContain('Écluses–несохранено');
  expect(texts.at(-1)).toContain('Not saved');
});

test('one’s own study is printed as the version that is saved', async ({ page }) => {
  await register(page);
  await page.goto('/studies');
  await page.getByRole('button', { name: 'Start a study' }).first().click();
  await expect(page.getByTestId('saving')).toHaveText(/version 1$/);
  await page.getByRole('button', { name: 'Export', exact: true }).click();
  const { bytes } = await take(page, 'Score as PDF');
  expect((await readPdf(bytes)).texts.at(-1)).toContain('Version 1, ');
});

/** A study without an account whose print takes long. */
async function openLong(page: Page): Promise<void> {
  const instruments = Array.from({ length: 8 }, (_, n) => ({ id: `i${n}`, name: `Pot ${n + 1}`, family: 'found' }));
  const lines = instruments.map(({ id }) => ({ instrument: id, rhythm: '[1/8 1/8 1/16 1/16 1/8 1/4 (1/4)]x500' }));
  const document = { title: 'Long weir', metre: '4/4', tempo: { beat: '1/4', perMinute: '60' }, instruments, sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines }] };
  await page.addInitScript((text) => localStorage.setItem('sesqui.draft.draft-long', text), JSON.stringify({ document, baseVersion: null, texts: {}, changedAt: new Date().toISOString() }));
  await page.goto('/studies/draft-long');
  await page.getByRole('button', { name: 'Export', exact: true }).click();
}

test('a long print tells how far it is, goes on while the menu is closed, and can be cancelled', async ({ page, request }) => {
  await fromNewAddress(page);
  await openLong(page);
  await menu(page).getByRole('button', { name: 'Score as PDF' }).click();
  await expect(menu(page).getByRole('status')).toHaveText(/^Score as PDF: \d+ of \d+$/, { timeout: 30_000 });
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: /^Score as PDF: / }).click();
  const asked = page.waitForRequest((one) => one.method() === 'DELETE');
  await menu(page).getByRole('button', { name: 'Cancel' }).click();
  await expect(menu(page).getByRole('status')).toHaveText('Score as PDF: cancelled.');
  await expect(menu(page).getByRole('status')).toBeFocused();
  const path = new URL((await asked).url()).pathname;
  const token = await page.evaluate(() => localStorage.getItem('sesqui.export-token') ?? '');
  await expect.poll(async () => ((await (await request.get(path, { headers: { 'x-export-token': token } })).json()) as { export: { state: string } }).export.state).toBe('cancelled');
  await expect(menu(page).getByRole('button', { name: 'The study as JSON' })).toBeEnabled();
});

test('what cannot be written is said with the reason', async ({ page }) => {
  const document = { title: 'Odd', metre: '4/4', tempo: { beat: '1/4', perMinute: '60' }, instruments: [{ id: 'pots', name: 'Pots', family: 'found' }], sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines: [{ instrument: 'pots', rhythm: '1/1031 1030/1031' }] }] };
  await page.addInitScript((text) => localStorage.setItem('sesqui.draft.draft-odd', text), JSON.stringify({ document, baseVersion: null, texts: {}, changedAt: new Date().toISOString() }));
  await page.goto('/studies/draft-odd');
  await page.getByRole('button', { name: 'Export', exact: true }).click();
  for (const what of ['Score as MusicXML', 'Score as PDF']) {
    await menu(page).getByRole('button', { name: what, exact: true }).click();
    await expect(menu(page).getByRole('alert')).toHaveText(new RegExp(`^${what}: Pots: .*cannot be written`));
  }
});

test('what cannot be made is said in a sentence', async ({ page, complaints }) => {
  await page.route('**/api/exports', (route) => route.abort());
  await openMenu(page);
  await menu(page).getByRole('button', { name: 'Score as PDF' }).click();
  await expect(menu(page).getByRole('alert')).toHaveText('Score as PDF: Sesqui cannot be reached. Check the connection and try again.');
  complaints.splice(0);
});

test('the open menu has nothing that axe-core finds wrong, light and dark', async ({ browser, complaints }) => {
  const axe = fs.readFileSync('node_modules/axe-core/axe.min.js', 'utf8');
  for (const colorScheme of ['light', 'dark'] as const) {
    // The page's own policy would not let the checker in.
    const page = await browser.newPage({ colorScheme, bypassCSP: true });
    await openMenu(page);
    await page.evaluate(axe);
    const found = await page.evaluate(async () => {
      const { axe } = window as unknown as { axe: { run: (at: string) => Promise<{ violations: { id: string; nodes: { html: string }[] }[] }> } };
      return (await axe.run('[role=dialog]')).violations.map(({ id, nodes }) => [id, nodes[0]?.html]);
    });
    expect([colorScheme, found]).toEqual([colorScheme, []]);
    await page.close();
  }
  expect(complaints).toEqual([]);
});

test('the menu is used by the keyboard alone, and on a narrow screen', async ({ page }) => {
  await page.setViewportSize({ width: 390, height: 844 });
  await openStudy(page);
  await page.getByRole('button', { name: 'Export', exact: true }).focus();
  await page.keyboard.press('Enter');
  await expect(menu(page).getByRole('radio', { name: 'A4' })).toBeFocused();
  const json = menu(page).getByRole('button', { name: 'The study as JSON' });
  for (let n = 0; n < 60 && !(await json.evaluate((one) => one === document.activeElement)); n += 1) await page.keyboard.press('Tab');
  const [download] = await Promise.all([page.waitForEvent('download'), page.keyboard.press('Enter')]);
  expect(JSON.parse(new TextDecoder().decode(await bytesOf(download)))).toEqual(lockGates);
  await page.keyboard.press('Tab');
  await expect(menu(page).getByRole('radio', { name: 'A4' })).toBeFocused();
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  await page.keyboard.press('Escape');
  await expect(menu(page)).toBeHidden();
  await expect(page.getByRole('button', { name: 'Export', exact: true })).toBeFocused();
});
