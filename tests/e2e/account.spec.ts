import { expect, forgetRefusals, test } from '../helpers/browser';
import { alert, fromNewAddress, invent, openStudy, register, signInAs, signOut } from './open';

const me = (page: Parameters<typeof register>[0]) => page.getByRole('banner').getByRole('link', { name: /Iva/ });

test('an account is made, signs in, and finds its way back to where it was asked for', async ({ page }) => {
  const person = await register(page, 'Teacher');
  await expect(me(page)).toHaveText('Iva Towpath · teacher');
  await signOut(page);
  await page.goto('/account');
  await expect(page).toHaveURL(/\/sign-in\?next=\/account$/);
  await signInAs(page, person);
  await expect(page.getByRole('heading', { name: 'Account' })).toBeVisible();
  // Whoever is signed in has nothing to do on these pages.
  for (const path of ['/sign-in', '/register']) {
    await page.goto(path);
    await expect(page).toHaveURL(/\/studies$/);
  }
});

test('a way back that leads elsewhere is not followed', async ({ page }) => {
  const person = await register(page);
  await signOut(page);
  await page.goto(`/sign-in?next=${encodeURIComponent('//elsewhere.example/studies')}`);
  await signInAs(page, person);
  await expect(page).toHaveURL(/^http:\/\/127\.0\.0\.1:\d+\/studies$/);
});

test('the answer to a known address is the answer to a new one, and the account stays as it is', async ({ page, complaints }) => {
  const person = await register(page);
  await signOut(page);
  await page.goto('/register');
  await page.getByRole('textbox', { name: 'Name' }).fill('Somebody Else');
  await page.getByRole('textbox', { name: 'E-mail' }).fill(person.email.toUpperCase());
  await page.getByLabel('Password').fill('another long password');
  await page.getByRole('button', { name: 'Make an account' }).click();
  await expect(page.getByRole('status').filter({ hasText: 'If no account had this address' })).toBeVisible();
  await signInAs(page, { email: person.email, password: 'another long password' });
  await expect(alert(page)).toContainText('This e-mail address and password do not go together.');
  await signInAs(page, person);
  await expect(me(page)).toHaveText('Iva Towpath · composer');
  forgetRefusals(complaints);
});

test('what is wrong with what was typed is said at its field, and nothing typed is lost', async ({ page }) => {
  await fromNewAddress(page);
  await page.goto('/register');
  const fields = { Name: 'x'.repeat(400), 'E-mail': 'no-at-sign.example', Password: 'seven77' };
  for (const [label, text] of Object.entries(fields)) await page.getByLabel(label).fill(text);
  await page.getByRole('button', { name: 'Make an account' }).click();
  for (const sentence of ['A name has at most 100 characters.', 'An e-mail address has an @ with something before and after it.', 'A password has at least 8 characters.']) {
    await expect(alert(page).filter({ hasText: sentence })).toBeVisible();
  }
  for (const [label, text] of Object.entries(fields)) await expect(page.getByLabel(label)).toHaveValue(text);
  await page.getByLabel('Password').fill('x'.repeat(5_000));
  await page.getByRole('button', { name: 'Make an account' }).click();
  await expect(alert(page).filter({ hasText: 'A password has at most 128 characters.' })).toBeVisible();
});

test('many wrong passwords: the page says to wait', async ({ page, complaints }) => {
  await fromNewAddress(page);
  const { email } = invent();
  await page.goto('/sign-in');
  for (let tries = 1; tries <= 11; tries += 1) {
    await signInAs(page, { email, password: `wrong ${tries}` });
    await expect(alert(page)).toBeVisible();
    await expect(page.getByRole('button', { name: 'Sign in' })).toBeEnabled();
  }
  await expect(alert(page)).toHaveText('There were many attempts with this address. Wait a quarter of an hour, and try again.');
  forgetRefusals(complaints);
});

test('name, names of values and paper are kept; the study page then speaks of crotchets', async ({ page, complaints }) => {
  await register(page);
  await page.goto('/account');
  await page.getByRole('textbox', { name: 'Name' }).fill('Iva Sluice');
  await page.getByRole('button', { name: 'Change the name' }).click();
  await expect(me(page)).toHaveText('Iva Sluice · composer');
  await page.getByRole('radio', { name: 'British' }).check();
  await expect(page.getByText('Semibreve, minim, crotchet, quaver.')).toBeVisible();
  await page.getByRole('radio', { name: 'Letter' }).check();
  await expect(page.getByText('8½ by 11 inches.')).toBeVisible();
  await page.reload();
  await expect(page.getByRole('radio', { name: 'British' })).toBeChecked();
  await expect(page.getByRole('radio', { name: 'Letter' })).toBeChecked();
  await openStudy(page, 'lock-gates');
  await expect(page.getByRole('button', { name: /^Tempo: crotchet = / })).toBeVisible();
  await page.goto('/account');
  await page.getByRole('textbox', { name: 'Name' }).fill('   ');
  await page.getByRole('button', { name: 'Change the name' }).click();
  await expect(alert(page).filter({ hasText: 'A name is missing.' })).toBeVisible();
  forgetRefusals(complaints);
});

test('a new password ends every other session, and this one goes on', async ({ page, browser, complaints }) => {
  const person = await register(page);
  const elsewhere = await (await browser.newContext()).newPage();
  await elsewhere.goto('/sign-in');
  await signInAs(elsewhere, person);
  await expect(elsewhere).toHaveURL(/\/studies$/);

  await page.goto('/account');
  const change = async (current: string, next: string) => {
    await page.getByLabel('Present password').fill(current);
    await page.getByLabel('New password').fill(next);
    await page.getByRole('button', { name: 'Change the password' }).click();
  };
  await change('not this one', 'eleven iron paddles');
  await expect(alert(page).filter({ hasText: 'This is not the present password.' })).toBeVisible();
  await change(person.password, 'password');
  await expect(alert(page).filter({ hasText: 'among the first that anybody would guess' })).toBeVisible();
  await change(person.password, 'eleven iron paddles');
  await expect(page.getByRole('status').filter({ hasText: 'The password is changed.' })).toBeVisible();

  await page.goto('/account');
  await expect(page.getByRole('heading', { name: 'Account' })).toBeVisible();
  await elsewhere.goto('/account');
  await expect(elsewhere).toHaveURL(/\/sign-in/);
  await signInAs(elsewhere, { ...person, password: 'eleven iron paddles' });
  await expect(elsewhere.getByRole('heading', { name: 'Account' })).toBeVisible();

  // Signing out everywhere ends this one too.
  await page.getByRole('button', { name: 'Sign out everywhere' }).click();
  await expect(page).toHaveURL(/\/sign-in/);
  await elsewhere.goto('/account');
  await expect(elsewhere).toHaveURL(/\/sign-in/);
  await elsewhere.context().close();
  forgetRefusals(complaints);
});
