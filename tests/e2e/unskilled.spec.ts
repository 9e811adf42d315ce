import type { Page } from '@playwright/test';
import { expect, test } from '../helpers/browser';

/** What somebody types who has never seen the page: understood where a person would understand it, else told what to type. */
type Inputs = readonly (readonly [typed: string, understood: string | null])[];

const NUMBER: Inputs = [
  ['', null], ['three', null], ['1,5', '3/2'], ['150 %', '3/2'], ['1½', '3/2'], [' 3 / 2 ', '3/2'], ['9'.repeat(40), null], ['-3', null], ['3:2', '3/2'], ['1.5\t', '3/2'],
];
const LIST: Inputs = [
  ['', null], ['four, six', null], ['1,5; 2,25', '3/2'], ['150 %, 225 %', '3/2'], ['1½, 2¼', '3/2'], ['3/2  9/4', '3/2'], ['9'.repeat(60), null], ['4, -6', null], ['4\t6\t9', '4'], ['1.5; 2.25;', '3/2'],
];
const FIELDS: readonly (readonly [heading: string, label: string, inputs: Inputs])[] = [
  ['Lengths', 'Lengths, in measures', LIST],
  ['Lengths', 'Claim: each to the one before', NUMBER],
  ['Stretch', 'Measures', NUMBER],
  ['Stretch', 'Factor', NUMBER],
  ['Stretch', 'Quarters a minute of the stretch', NUMBER],
  ['Tempo', 'Quarters a minute', NUMBER],
  ['Alignment', 'Cycles, in whole notes', LIST],
  ['Alignment', 'Quarters a minute of the cycles', NUMBER],
  ['Division', 'The whole, in measures', NUMBER],
  ['Division', 'Ratios', LIST],
  ['Division', 'Unit of rounding, in measures', NUMBER],
  ['Canon', 'Measures of the subject', NUMBER],
  ['Canon', 'Speeds', LIST],
];

/** Types into a word of a calculator: taken, or the sentence that says why not. */
async function type(page: Page, heading: string, label: string, typed: string): Promise<'taken' | string> {
  const region = page.getByRole('region', { name: heading, exact: true });
  await region.getByRole('button', { name: new RegExp(`^${label.replaceAll(/[.*+?^${}()|[\]\\]/g, '\\$&')}: `) }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('textbox').fill(typed);
  await dialog.getByRole('button', { name: 'Set' }).click();
  await expect(dialog.getByRole('alert').or(region.getByRole('alert')).or(region.getByTestId('result')).first()).toBeVisible();
  const refused = (await dialog.count()) > 0 ? await dialog.getByRole('alert').textContent() : null;
  if (refused !== null) {
    await page.keyboard.press('Escape');
    await expect(dialog).toHaveCount(0);
    return refused;
  }
  const below = region.getByRole('alert');
  return (await below.count()) > 0 ? ((await below.textContent()) ?? '') : 'taken';
}

test('ten unskilled inputs for each field of the calculators', async ({ page }) => {
  test.setTimeout(240_000);
  for (const [heading, label, inputs] of FIELDS) {
    for (const [typed, understood] of inputs) {
      await page.goto(heading === 'Division' ? '/proportions?way=ratios&whole=90' : '/proportions');
      const said = await type(page, heading, label, typed);
      const where = `${heading}, ${label}: ${JSON.stringify(typed)} → ${said}`;
      if (understood === null) expect(said, where).toMatch(/^(?!taken)[A-Z“].*[.]$/s);
      // A division of one measure and a half, or a unit that does not fit, may say so; it is understood all the same.
      else expect(said === 'taken' || !/is no number|Nothing is written/.test(said), where).toBe(true);
    }
  }
});

const RHYTHM: Inputs = [
  ['', null], ['quarter eighth', null], ['0,25 0,125', '1/4 1/8'], ['50% 25%', null], ['¼ ⅛', '1/4 1/8'], ['1 / 4   1/8', '1/4 1/8'], ['9'.repeat(40), null], ['-1/4', null], ['1/4, 1/8', '1/4 1/8'], ['1/4\t1/8\n', '1/4 1/8'],
];

test('ten unskilled inputs for the rhythms and the metre of Check', async ({ page }) => {
  test.setTimeout(120_000);
  await page.goto(`/check?${new URLSearchParams({ subject: '1/4 1/8', answer: '1/4 1/8', steps: '[]' })}`);
  // Notes are drawn in the browser only: where they stand, the page answers to typing.
  await expect(page.locator('main [data-origin]').first()).toBeVisible();
  for (const label of ['Subject', 'Your answer']) {
    const field = page.getByRole('textbox', { name: label, exact: true });
    for (const [typed, understood] of RHYTHM) {
      await field.fill(typed);
      const where = `${label}: ${JSON.stringify(typed)}`;
      if (understood !== null) await expect(page.getByRole('heading', { name: 'Right', exact: true }), where).toBeVisible();
      else if (typed !== '') await expect(page.locator('main').getByRole('alert'), where).toContainText(/[.]$/);
      else await expect(page.getByTestId('marks'), where).toHaveCount(0);
      await expect(field).toHaveValue(typed);
    }
    await field.fill('1/4 1/8');
  }
  const metre = page.getByRole('textbox', { name: /^Metre/ });
  for (const typed of ['', 'four four', '4:4', '4/0', '0/4', '-4/4', '4/5', '99999/4', '½', '4/4/4']) {
    await metre.fill(typed);
    await expect(page.getByText('Write a metre such as 4/4, 7/8 or 3+2+2/8.'), typed).toBeVisible();
  }
  await metre.fill(' 3 + 2 + 2 / 8 ');
  await expect(page.getByText('Write a metre such as')).toHaveCount(0);
});
