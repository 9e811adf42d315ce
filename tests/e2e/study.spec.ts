import { expect, test } from '../helpers/browser';
import { alert, drawnScore, openStudy, sentence, setWord, word } from './open';

test('opens the demo from the database: title, totals with their sums, clock, mirrors', async ({ page }) => {
  await openStudy(page);
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Lock Gates');
  const facts = page.getByTestId('facts');
  await expect(facts).toContainText('23 + 4 + 23 + 4 + 23 = 77 measures of 4/4');
  await expect(facts).toContainText('quarter = 84');
  await expect(facts).toContainText('3′40″');
  await expect(facts).toContainText('4 players, 8 instruments');
  await expect(facts).toContainText('Filling with Emptying and Sluice with Sluice, reversed mirror about Pound');
  await expect(page.getByText('A mirror in form, not in values, not in attacks')).toBeVisible();
  await expect(sentence(page)).toHaveText(
    'The subject is stated 4 times, one after another, at 1, 5/4, 3/2, 2 times its length, forwards, by crotales, temple blocks, log drum and tam-tam.',
  );
  await expect(page.getByTestId('section-sum')).toContainText('4 + 5 + 6 + 8 = 23 measures');
});

test('one factor changed in the sentence: sum, strip, threads, score and its mirror follow; undo and redo', async ({ page }) => {
  await openStudy(page);
  await drawnScore(page);
  await setWord(page, 'Factors', '1, 125%, 1.5, 5/2');
  await expect(sentence(page)).toContainText('at 1, 5/4, 3/2, 5/2 times its length');
  await expect(page.getByTestId('section-sum')).toContainText('4 + 5 + 6 + 10 = 25 measures');
  await expect(page.getByTestId('facts')).toContainText('25 + 4 + 23 + 4 + 25 = 81 measures');
  const form = page.getByRole('region', { name: 'Form' });
  await expect(form.getByRole('button', { name: /Statement 4 of 4, tam-tam: at 5\/2 times its length.*measures 16 to 25/ })).toBeVisible();
  await expect(page.getByRole('slider', { name: /Statement 4 of 4, tam-tam: at 5\/2/ })).toBeVisible();
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(page.getByTestId('section-sum')).toContainText('4 + 5 + 6 + 8 = 23 measures');
  await page.getByRole('button', { name: 'Redo' }).click();
  await expect(page.getByTestId('section-sum')).toContainText('= 25 measures');
});

test('every step made equal by one word', async ({ page }) => {
  await openStudy(page);
  await expect(page.getByTestId('section-sum')).toContainText('Each statement is 5/4, 6/5, then 4/3 of the one before it: the steps are not equal.');
  await page.getByTestId('section-sum').getByRole('button', { name: 'Make every step equal' }).click();
  await expect(sentence(page)).toContainText('each 5/4 times as long as the one before');
  await expect(page.getByTestId('section-sum')).not.toContainText('not equal');
});

test('the other words: count, entries, reading, instruments and their order', async ({ page }) => {
  await openStudy(page);
  await setWord(page, 'Number of statements', '3');
  await expect(sentence(page)).toContainText('is stated 3 times');
  await expect(sentence(page)).toContainText('Waiting for a statement: tam-tam.');

  await word(page, 'Entries').click();
  await page.getByRole('radio', { name: 'all ending together' }).check();
  await expect(sentence(page)).toContainText('all ending together');
  await expect(page.getByTestId('section-sum')).toContainText('6 measures');
  await page.getByRole('radio', { name: 'a new one every so often' }).check();
  const entries = page.getByRole('dialog', { name: 'Entries' });
  await entries.getByRole('textbox').fill('2');
  await entries.getByRole('button', { name: 'Set' }).click();
  await expect(sentence(page)).toContainText('entering every 2 measures');

  await word(page, 'Reading').click();
  await page.getByRole('dialog', { name: 'Reading' }).getByRole('combobox').selectOption({ label: 'backwards by attacks' });
  await expect(sentence(page)).toContainText('backwards by attacks');
  await page.keyboard.press('Escape');

  await word(page, 'Instrument').click();
  await page.getByRole('dialog', { name: 'Instrument' }).getByRole('button', { name: 'Later' }).click();
  await expect(sentence(page)).toContainText('by temple blocks, crotales and log drum');
});

test('threads have three readings; an attack lights everywhere', async ({ page }) => {
  await openStudy(page);
  await drawnScore(page);
  const second = page.getByRole('slider', { name: /Statement 2 of 4/ });
  await second.focus();
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('ArrowRight');
  await expect(second).toHaveAttribute('aria-valuetext', 'Attack 2 of 13, measure 5, beat 2 7/8');
  await expect(page.getByRole('slider', { name: /Statement 1 of 4/ })).toHaveAttribute('aria-valuetext', 'Attack 2 of 13, measure 1, beat 2 1/2');
  await expect.poll(() => page.locator('.vf-stavenote.lit').count()).toBeGreaterThan(0);
  const lit = await page.locator('.vf-stavenote.lit').evaluateAll((notes) => notes.map((note) => (note as SVGElement).dataset.origin));
  expect(new Set(lit)).toEqual(new Set(['1']));
  for (const name of ['In time', 'To one end', 'From one start']) {
    await page.getByRole('radio', { name }).check({ force: true });
    await expect(page.getByRole('radio', { name })).toBeChecked();
  }
});

test('choosing a statement on the strip moves the rest to it', async ({ page }) => {
  await openStudy(page);
  const score = page.getByRole('region', { name: /^Staves/ });
  await page.getByRole('region', { name: 'Form' }).getByRole('button', { name: /^Emptying\./ }).click();
  await expect(page.getByRole('heading', { name: 'How “Emptying” is made' })).toBeVisible();
  await expect(sentence(page)).toHaveText('“Filling” is played from its end, its values reversed.');
  await expect(page.getByText('measure 55, Emptying, 4/4')).toBeVisible();
  await expect.poll(() => score.evaluate((box) => box.scrollTop)).toBeGreaterThan(200);
  await expect(page.getByTestId('section-sum')).toContainText('8 + 6 + 5 + 4 = 23 measures');
});

test('a mirror is chosen by its word, and a ring of mirrors is refused', async ({ page }) => {
  await openStudy(page);
  await page.getByRole('region', { name: 'Form' }).getByRole('button', { name: /^Emptying\./ }).click();
  await word(page, 'What is reversed').click();
  await page.getByRole('radio', { name: 'its attacks reversed' }).check();
  await expect(sentence(page)).toContainText('its attacks reversed');
  await page.keyboard.press('Escape');
  await word(page, 'Section that is mirrored').click();
  await page.getByRole('radio', { name: 'Sluice, reversed' }).check();
  await expect(sentence(page)).toContainText('“Sluice, reversed” is played from its end');
  await page.keyboard.press('Escape');
  await page.getByRole('region', { name: 'Form' }).getByRole('button', { name: /^Sluice, reversed\./ }).click();
  await word(page, 'Section that is mirrored').click();
  await page.getByRole('radio', { name: 'Emptying' }).click();
  await expect(alert(page)).toContainText('mirror one another in a ring');
  await expect(sentence(page)).toContainText('“Sluice” is played from its end');
});

test('the subject: text and staff, errors at their place, nothing lost', async ({ page }) => {
  await openStudy(page);
  const field = page.getByRole('textbox', { name: /^Lengths in whole notes/ });
  const before = await field.inputValue();
  const notes = page.getByTestId('rhythm-staff').locator('.vf-stavenote');
  await expect(notes.first()).toBeAttached();
  await field.fill('1/4 1/8 1/0 1/8');
  await expect(alert(page)).toContainText('divides by zero');
  await expect(alert(page).locator('mark')).toHaveText('1/0');
  await expect(field).toHaveValue('1/4 1/8 1/0 1/8');
  await expect(page.getByTestId('facts')).toContainText('77 measures');
  await page.reload();
  await expect(field).toHaveValue('1/4 1/8 1/0 1/8');
  await field.fill('1/2 1/4 1/4 | 1 | 1/2 (1/2)');
  await expect(alert(page)).toHaveCount(0);
  await expect(page.getByTestId('section-sum')).toContainText('= 17 1/4 measures');
  await expect(notes).toHaveCount(6);
  expect(before).not.toBe(await field.inputValue());
});

test('changes stay in the browser over a reload, and can be thrown away', async ({ page }) => {
  await openStudy(page);
  await setWord(page, 'Factors', '1, 2');
  await expect(sentence(page)).toContainText('is stated twice');
  await page.reload();
  await expect(sentence(page)).toContainText('is stated twice');
  await expect(page.getByText('Your changes are kept in this browser.')).toBeVisible();
  await page.goto('/studies');
  await expect(page.getByRole('link', { name: /Lock Gates.*your changes to Lock Gates/ })).toBeVisible();
  await openStudy(page);
  await page.getByRole('button', { name: 'Throw my changes away' }).click();
  await page.getByRole('button', { name: 'Throw away', exact: true }).click();
  await expect(sentence(page)).toContainText('is stated 4 times');
  await page.reload();
  await expect(sentence(page)).toContainText('is stated 4 times');
});

test('a new study is begun, filled and kept without an account', async ({ page }) => {
  await page.goto('/');
  await page.getByRole('button', { name: 'Start a study' }).first().click();
  await expect(page).toHaveURL(/\/studies\/draft-/);
  await expect(sentence(page)).toContainText('is stated twice');
  await page.getByRole('button', { name: /^Title: / }).click();
  await page.getByRole('textbox', { name: 'Title' }).fill('Slow Weir');
  await page.getByRole('button', { name: 'Set' }).click();
  await page.getByRole('button', { name: /^Add a section/ }).click();
  await page.getByRole('radio', { name: 'This one, reversed' }).check();
  await page.getByRole('dialog').getByRole('button', { name: 'Add', exact: true }).click();
  await expect(sentence(page)).toHaveText('“Opening” is played from its end, its values reversed.');
  await page.reload();
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Slow Weir');
  await page.goto('/studies');
  await page.getByRole('link', { name: /Slow Weir/ }).click();
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Slow Weir');
});

test('an unknown study says so', async ({ page, complaints }) => {
  await page.goto('/studies/no-such-study');
  await expect(alert(page).filter({ hasText: /stud/ })).toBeVisible();
  complaints.length = 0;
});
