import type { Page } from '@playwright/test';
import { expect, test } from '../helpers/browser';
import { sentence } from './open';

const section = (page: Page, heading: string) => page.getByRole('region', { name: heading, exact: true });
const result = (page: Page, heading: string) => section(page, heading).getByTestId('result');
const notes = (page: Page, heading: string) => section(page, heading).getByTestId('notes');
const address = (values: Record<string, string>) => `/proportions?${new URLSearchParams(values)}`;

/** Published values through the page itself: what is typed, and what it must say; the source beside each. */
const CASES: readonly (readonly [source: string, heading: string, values: Record<string, string>, result: string, note: string])[] = [
  // lengths
  ['common practice, no source: 4, 6, 8, 12 are steps of 3:2, 4:3, 3:2', 'Lengths', { lengths: '4, 6, 8, 12', claim: '150%' }, '4 + 6 + 8 + 12 = 30', 'No: the second step is 4/3.'],
  ['T3: each half as long again is a geometric run', 'Lengths', { lengths: '4, 6, 9, 13 1/2', claim: '3/2' }, '4 + 6 + 9 + 13 1/2 = 32 1/2', 'Yes: each is half as long again.'],
  ['T3: 4 6 8 10 is arithmetic', 'Lengths', { lengths: '4 6 8 10', claim: '3/2' }, '4 + 6 + 8 + 10 = 28', 'No: the second step is 4/3.'],
  ['Stainer and Barrett: dupla 2:1', 'Lengths', { lengths: '1, 2' }, '1 + 2 = 3', '2 (dupla)'],
  ['Stainer and Barrett: tripla 3:1', 'Lengths', { lengths: '1, 3' }, '1 + 3 = 4', '3 (tripla)'],
  ['Stainer and Barrett: sesquialtera 3:2', 'Lengths', { lengths: '2, 3' }, '2 + 3 = 5', '3/2 (sesquialtera)'],
  ['Stainer and Barrett: sesquitertia 4:3', 'Lengths', { lengths: '3, 4' }, '3 + 4 = 7', '4/3 (sesquitertia)'],
  ['Stainer and Barrett: sesquiquarta 5:4', 'Lengths', { lengths: '4, 5' }, '4 + 5 = 9', '5/4 (sesquiquarta)'],
  ['Stainer and Barrett: superbipartiens tertias 5:3', 'Lengths', { lengths: '3, 5' }, '3 + 5 = 8', '5/3 (superbipartiens tertias)'],
  ['Stainer and Barrett: supertripartiens quartas 7:4', 'Lengths', { lengths: '4, 7' }, '4 + 7 = 11', '7/4 (supertripartiens quartas)'],
  ['Stainer and Barrett: tripla superbipartiens quintas 17:5', 'Lengths', { lengths: '5, 17' }, '5 + 17 = 22', '17/5 (tripla superbipartiens quintas)'],
  ['Stainer and Barrett: sub- turns the ratio over', 'Lengths', { lengths: '3, 2' }, '3 + 2 = 5', '2/3 (subsesquialtera)'],
  ['Grove III, 42: tripla sesquialtera 7:2', 'Lengths', { lengths: '2, 7' }, '2 + 7 = 9', '7/2 (tripla sesquialtera)'],
  ['T15: 27:8 is supertripartiens octavas', 'Lengths', { lengths: '8, 27' }, '8 + 27 = 35', '27/8 (tripla supertripartiens octavas)'],
  ['Dufay, Nuper rosarum flores, 6:4:2:3 (Turner, 1991)', 'Lengths', { lengths: '6, 4, 2, 3' }, '6 + 4 + 2 + 3 = 15', 'To the first: 1, 2/3, 1/3, 1/2.'],
  // stretch
  ['Messiaen, ch. IV: add a quarter of each value, 5/4', 'Stretch', { measures: '4', factor: '5/4' }, '4 × 5/4 = 5', 'It ends with a measure.'],
  ['Messiaen, ch. IV: add a third, 4/3', 'Stretch', { measures: '6', factor: '4/3' }, '6 × 4/3 = 8', 'not as a metre: 4/3 times 4/4 is no metre'],
  ['Messiaen, ch. IV: the dot, 3/2', 'Stretch', { measures: '8', factor: '1.5' }, '8 × 3/2 = 12', 'dotted quarter = quarter: quarter = 56; or in 12/8'],
  ['Messiaen, ch. IV: withdraw the dot, 2/3', 'Stretch', { measures: '6', factor: '2/3' }, '6 × 2/3 = 4', 'The proportion is subsesquialtera.'],
  ['openknowledgegraph.com: two measures doubled become four', 'Stretch', { measures: '2', factor: '200%' }, '2 × 2 = 4', 'The proportion is dupla.'],
  ['T7: a whole measure at 9/8 ends inside a measure', 'Stretch', { measures: '1', factor: '9/8' }, '1 × 9/8 = 1 1/8', 'It ends 1/8 into a measure'],
  // tempo
  ['Winold, 1975, 230-231 (Carter, Fantasy, mm. 16-17)', 'Tempo', { tempo: '84', pivots: '1/3=1/2' }, 'quarter = 126', 'diminution by tempo'],
  ['Winold: the dotted quarter becomes the quarter', 'Tempo', { tempo: '84', pivots: '3/8=1/4' }, 'quarter = 56', 'augmentation by tempo'],
  ['T10: upside down it is another tempo', 'Tempo', { tempo: '84', pivots: '1/4=3/8' }, 'quarter = 126', '2/3 as long'],
  ['Benadon: a septuplet pivot, 4/7', 'Tempo', { tempo: '60', pivots: '7/16=1/4' }, 'quarter = 34 2/7', '2/7 of a beat behind after a minute'],
  ['there and back', 'Tempo', { tempo: '72', pivots: '3/8=1/4;1/4=3/8' }, 'quarter = 72', 'On the way: quarter = 48.'],
  // alignment
  ['13.5: 3 and 4 after 12', 'Alignment', { cycles: '3, 4' }, '12', 'they give 3 1 2 2 1 3'],
  ['openknowledgegraph.com: 3 and 5 after 15', 'Alignment', { cycles: '3, 5' }, '15', 'they give 3 2 1 3 1 2 3'],
  ['Schillinger, 1946: 3 against 2', 'Alignment', { cycles: '3, 2' }, '6', 'they give 2 1 1 2'],
  ['Schillinger, 1946: 5 against 4', 'Alignment', { cycles: '5, 4' }, '20', 'they give 4 1 3 2 2 3 1 4'],
  ['Schillinger, 1946: 7 against 5', 'Alignment', { cycles: '7, 5' }, '35', 'they give 5 2 3 4 1 5 1 4 3 2 5'],
  ['13.5: 8 and 9 after 72', 'Alignment', { cycles: '8, 9' }, '72', '72 states'],
  ['13.5: 6 and 9 after 18', 'Alignment', { cycles: '6, 9' }, '18', 'In steps of 3 there are 6 states'],
  ['Machaut, M4: colour 18, talea 12 (bestmusicteacher.com)', 'Alignment', { cycles: '18, 12' }, '36', 'In steps of 6 there are 6 states'],
  ['Sunzi suanjing, III, 26, from memory: 2 by threes, 3 by fives, 2 by sevens', 'Alignment', { cycles: '3 from 2, 5 from 3, 7 from 2' }, '23', 'In steps of 1 there are 105 states'],
  ['entries with nothing in common never meet', 'Alignment', { cycles: '4, 6 from 1' }, 'never', 'they never begin a turn together'],
  ['a cycle that turns too seldom has ended', 'Alignment', { cycles: '3 x2, 4' }, '12', 'Cycle 1 has ended by then: it turns 2 times only.'],
  ['named the other way: sesquialtera is 3/2', 'Lengths', { lengths: '4, 6, 9', claim: 'sesquialtera' }, '4 + 6 + 9 = 19', 'Yes: each is half as long again.'],
  // division
  ['13.1, Lendvai’s tradition: 443 measures, 274', 'Division', { whole: '443', way: 'golden' }, '274 + 169 = 443', 'is no fraction'],
  ['13.1, Lendvai’s tradition: 93 measures, 57', 'Division', { whole: '93', way: 'golden' }, '57 + 36 = 93', 'is no fraction'],
  ['13.2, from memory: 89 is 55 and 34', 'Division', { whole: '89', way: 'golden' }, '55 + 34 = 89', 'measure 56'],
  ['Fibonacci: 55 = 34 + 21', 'Division', { whole: '55', way: 'ratios', shares: '34, 21' }, '34 + 21 = 55', 'Every part is exact.'],
  ['Kramer, 1973: 1 1 2 3 5 8 add up to 20', 'Division', { whole: '20', way: 'fibonacci', shares: '6' }, '1 + 1 + 2 + 3 + 5 + 8 = 20', 'Every part is exact.'],
  ['largest remainders: ten in three', 'Division', { whole: '10', way: 'evenly', shares: '3' }, '4 + 3 + 3 = 10', '3 1/3 (+2/3), 3 1/3 (−1/3), 3 1/3 (−1/3). The sum is kept.'],
  // canon
  ['4.13: tempi 4:5', 'Canon', { subject: '20', speeds: '4, 5' }, '0, 1', 'They last 5, 4 measures'],
  ['4.13: tempi 3:4:5', 'Canon', { subject: '60', speeds: '3, 4, 5' }, '0, 5, 8', 'at 0, 1/4, 2/5'],
  ['4.13: tempi 12:15:20', 'Canon', { subject: '60', speeds: '12, 15, 20' }, '0, 1, 2', 'They last 5, 4, 3 measures'],
  ['4.13: meeting in the middle halves the delays', 'Canon', { subject: '60', speeds: '3, 4, 5', meet: '1/2' }, '0, 2 1/2, 4', 'They last 20, 15, 12'],
  ['Polansky, Four Voice Canons: 2:3 enters at 1/3', 'Canon', { subject: '3', speeds: '2, 3' }, '0, 1/2', 'at 0, 1/3'],
];

test('published values, through the page itself', async ({ page }) => {
  test.setTimeout(180_000);
  expect(CASES.length).toBeGreaterThanOrEqual(40);
  for (const [source, heading, values, wanted, note] of CASES) {
    await page.goto(address(values));
    await expect(result(page, heading), source).toContainText(wanted);
    await expect(notes(page, heading), source).toContainText(note);
  }
});

test('a word is changed, the answer follows, the link opens it again, and what cannot be read says what to type', async ({ page }) => {
  await page.goto('/proportions');
  await section(page, 'Lengths').getByRole('button', { name: /^Lengths, in measures/ }).click();
  const dialog = page.getByRole('dialog');
  for (const [typed, sentenceOfIt] of [['', 'Nothing is written here.'], ['four', '“four” is no number.'], ['1/0', 'divides by zero'], ['-1', 'Every length must be above 0.'], ['9'.repeat(60), 'too large']] as const) {
    await dialog.getByRole('textbox').fill(typed);
    await dialog.getByRole('button', { name: 'Set' }).click();
    if (typed === '-1') break;
    await expect(dialog.getByRole('alert')).toContainText(sentenceOfIt);
  }
  await expect(section(page, 'Lengths').getByRole('alert')).toContainText('Every length must be above 0.');
  await section(page, 'Lengths').getByRole('button', { name: /^Lengths, in measures/ }).click();
  await page.getByRole('dialog').getByRole('textbox').fill('4 by 3/2 x4');
  await page.getByRole('dialog').getByRole('button', { name: 'Set' }).click();
  await expect(result(page, 'Lengths')).toContainText('4 + 6 + 9 + 13 1/2 = 32 1/2');
  await expect(page).toHaveURL(/lengths=4%2C\+6%2C\+9%2C\+13\+1%2F2/);
  const link = page.url();
  await page.goto('about:blank');
  await page.goto(link);
  await expect(result(page, 'Lengths')).toContainText('4 + 6 + 9 + 13 1/2 = 32 1/2');
});

test('copied as text, and made into a study', async ({ page, context }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  await page.goto(address({ subject: '60', speeds: '12, 15, 20' }));
  await section(page, 'Canon').getByRole('button', { name: 'Copy as text' }).click();
  await expect(section(page, 'Canon').getByText('Copied.')).toBeVisible();
  expect(await page.evaluate(() => navigator.clipboard.readText())).toContain('0, 1, 2 measures until each enters');
  await section(page, 'Canon').getByRole('button', { name: 'Make a study of this' }).click();
  await expect(sentence(page)).toContainText('all ending together, at 5/2, 2, 3/2 times its length');
});

test('nothing runs over the edge at 360 px', async ({ page }) => {
  await page.setViewportSize({ width: 360, height: 800 });
  for (const path of ['/proportions', '/check', '/check?mode=find']) {
    await page.goto(path);
    await page.waitForLoadState('networkidle');
    expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth), path).toBe(0);
  }
});
