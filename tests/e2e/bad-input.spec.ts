import { expect, test } from '../helpers/browser';
import { alert, openStudy, sentence, setWord } from './open';

/** Typed into the word “Factors”: what is said, and that nothing changes. */
const FACTORS: readonly (readonly [text: string, says: RegExp])[] = [
  ['1, 1/0', /divides by zero/],
  ['1, -1/4', /must be above 0/],
  ['1, 1/3/4', /is not a fraction/],
  ['1, 0', /must be above 0/],
  ['1, 1000000000', /out of reach/],
  ['1, abc', /is not a fraction/],
  ['', /No factor is written/],
  [Array<string>(400).fill('1').join(', '), /256/],
];

for (const [text, says] of FACTORS) {
  test(`factors “${text.slice(0, 24)}” are refused at the word`, async ({ page }) => {
    await openStudy(page);
    await setWord(page, 'Factors', text);
    await expect(page.getByRole('dialog', { name: 'Factors' }).getByRole('alert')).toHaveText(says);
    await expect(page.getByRole('dialog', { name: 'Factors' }).getByRole('textbox')).toHaveValue(text);
    await expect(sentence(page)).toContainText('at 1, 5/4, 3/2, 2 times its length');
  });
}

test('400 statements are refused, 256 are the limit', async ({ page }) => {
  await openStudy(page);
  await setWord(page, 'Number of statements', '400');
  await expect(alert(page)).toContainText('from 1 to 256 statements');
  await expect(sentence(page)).toContainText('is stated 4 times');
});

/** Typed into the subject: what is said, and which piece is marked. */
const SUBJECTS: readonly (readonly [text: string, says: RegExp, marked: string])[] = [
  ['1/4 1/0', /divides by zero/, '1/0'],
  ['1/4 -1/4', /is negative/, '-1/4'],
  ['1/3/4', /is not a length/, '1/3/4'],
  ['1/4 (1/8', /./, '('],
  ['1/4 1/2 | 1/4', /Measure 1 lasts 3\/4; in 4\/4 it should last 1/, '|'],
];

for (const [text, says, marked] of SUBJECTS) {
  test(`the subject “${text}” is marked and kept as typed`, async ({ page }) => {
    await openStudy(page);
    const field = page.getByRole('textbox', { name: /^Lengths in whole notes/ });
    await field.fill(text);
    await expect(alert(page)).toContainText(says);
    await expect(alert(page).locator('mark')).toContainText(marked);
    await expect(field).toHaveValue(text);
    await expect(page.getByTestId('facts')).toContainText('77 measures');
  });
}

test('a subject of 10,000 characters is read, and its page stays usable', async ({ page }) => {
  await openStudy(page);
  const field = page.getByRole('textbox', { name: /^Lengths in whole notes/ });
  const text = Array<string>(2_500).fill('1/8').join(' ');
  expect(text.length).toBeGreaterThan(9_990);
  await field.fill(text);
  await expect(page.getByText(/^2500 values, 2500 attacks/)).toBeVisible();
  await expect(field).toHaveValue(text);
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(page.getByTestId('facts')).toContainText('77 measures');
});

test('an instrument that plays cannot be removed; one that does not can', async ({ page }) => {
  await openStudy(page);
  const panel = page.getByRole('region', { name: 'Instruments' });
  await panel.getByRole('button', { name: 'Remove Crotales' }).click();
  await expect(panel.getByRole('alert')).toContainText('Crotales plays in “Filling”. Let another instrument play there first.');
  await panel.getByRole('textbox', { name: 'New instrument' }).fill('Spare gong');
  await panel.getByRole('button', { name: 'Add', exact: true }).click();
  await expect(panel.getByRole('rowheader', { name: 'Spare gong' })).toBeVisible();
  await panel.getByRole('button', { name: 'Remove Spare gong' }).click();
  await expect(panel.getByRole('rowheader', { name: 'Spare gong' })).toHaveCount(0);
});

test('two statements at once on one instrument are refused by name', async ({ page }) => {
  await openStudy(page);
  const word = sentence(page).getByRole('button', { name: /^Instrument: / }).nth(1);
  await word.click();
  await page.getByRole('dialog', { name: 'Instrument' }).getByRole('combobox').selectOption({ label: 'Crotales' });
  await page.keyboard.press('Escape');
  await sentence(page).getByRole('button', { name: /^Entries: / }).click();
  await page.getByRole('radio', { name: 'all beginning together' }).click();
  await expect(alert(page)).toContainText('Crotales would have to play two things at once: statement 1 of “Filling” and statement 2 of “Filling”');
  await expect(sentence(page)).toContainText('one after another');
});

/** Documents that another version, or a hand, left in the browser: they are shown, kept, and not opened. */
const DOCUMENTS: readonly (readonly [name: string, change: (document: Record<string, unknown>) => unknown])[] = [
  ['with a field that is not known', (document) => ({ ...document, echoes: 3 })],
  ['of another format', (document) => ({ ...document, format: 7 })],
  ['without sections', (document) => ({ ...document, sections: [] })],
  ['that is no document', () => 'nonsense'],
];

for (const [name, change] of DOCUMENTS) {
  test(`a kept document ${name} is refused, and nothing of it is lost`, async ({ page, request }) => {
    const { study } = (await (await request.get('/api/studies/lock-gates')).json()) as { study: { document: Record<string, unknown> } };
    const kept = JSON.stringify({ document: change(study.document), baseVersion: 1, texts: {}, changedAt: '2026-12-01T10:00:00.000Z' });
    await page.goto('/');
    await page.evaluate((text) => localStorage.setItem('sesqui.draft.lock-gates', text), kept);
    await page.goto('/studies/lock-gates');
    await expect(alert(page).filter({ hasText: 'Nothing was deleted' })).toBeVisible();
    await expect(page.getByRole('textbox')).toHaveValue(kept);
    expect(await page.evaluate(() => localStorage.getItem('sesqui.draft.lock-gates'))).toBe(kept);
    await page.getByRole('button', { name: /Throw it away/ }).click();
    await expect(sentence(page)).toBeVisible();
  });
}
