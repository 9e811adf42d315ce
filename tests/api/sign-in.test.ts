import { describe, expect, it } from 'vitest';
import { demoAccounts } from '@/db/demo/accounts';
import { ask, Reader } from '../helpers/api';

const [composer] = demoAccounts;
const errorOf = (body: unknown) => new URL((body as { url: string }).url).searchParams.get('error');

describe('signing in', () => {
  it('opens a session with the account’s id and role, in a cookie that scripts cannot read', async () => {
    const reader = new Reader('192.0.2.1');
    expect((await reader.ask('/api/auth/session')).body).toEqual({});
    const answer = await reader.signIn(composer!.email.toUpperCase(), composer!.password);
    expect(answer.status).toBe(200);
    const cookie = answer.headers.getSetCookie().find((line) => line.includes('session-token'));
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
    const { user } = (await reader.ask('/api/auth/session')).body as { user: Record<string, string> };
    expect(user).toEqual({ id: expect.stringMatching(/^[0-9a-f-]{36}$/), name: composer!.name, email: composer!.email, role: 'composer' });
  });

  it('still opens the demo when somebody is signed in', async () => {
    const reader = new Reader('192.0.2.2');
    await reader.signIn(composer!.email, composer!.password);
    expect((await reader.ask('/api/studies/lock-gates')).status).toBe(200);
    expect((await reader.ask('/api/studies/00000000-0000-4000-8000-000000000000')).status).toBe(404);
  });

  it('answers a wrong password and an unknown address alike', async () => {
    const wrong = await new Reader('192.0.2.3').signIn(composer!.email, 'not the password');
    const unknown = await new Reader('192.0.2.3').signIn('nobody@sesqui.example', 'not the password');
    expect(wrong.status).toBe(401);
    expect([unknown.status, unknown.body]).toEqual([wrong.status, wrong.body]);
    expect(errorOf(wrong.body)).toBe('CredentialsSignin');
  });

  it.each([
    ['nothing', '', ''],
    ['a password of 100,000 characters', 'composer@sesqui.example', 'x'.repeat(100_000)],
    ['an address of 100,000 characters', 'x'.repeat(100_000), 'x'],
    ['an address without @', 'composer', 'x'],
    ['a zero byte', 'composer\0@sesqui.example', 'x'],
  ])('refuses %s', async (_, email, password) => {
    const { status, body } = await new Reader('192.0.2.4').signIn(email, password);
    expect([status, errorOf(body)]).toEqual([401, 'CredentialsSignin']);
  });

  it('stops after ten tries in a quarter of an hour, for known and unknown addresses alike, and only for that sender', async () => {
    for (const email of ['student@sesqui.example', 'no-student@sesqui.example']) {
      const reader = new Reader('192.0.2.5');
      for (let i = 0; i < 10; i += 1) expect(errorOf((await reader.signIn(email, 'wrong')).body)).toBe('CredentialsSignin');
      expect(errorOf((await reader.signIn(email, 'wrong')).body)).toBe('too_many_attempts');
    }
    const student = demoAccounts.find((account) => account.role === 'student')!;
    expect(errorOf((await new Reader('192.0.2.5').signIn(student.email, student.password)).body)).toBe('too_many_attempts');
    expect((await new Reader('192.0.2.6').signIn(student.email, student.password)).status).toBe(200);
  });

  it('is not done without the page’s own token', async () => {
    const body = new URLSearchParams({ email: composer!.email, password: composer!.password, json: 'true' });
    const answer = await ask('/api/auth/callback/credentials', { method: 'POST', body });
    expect(answer.headers.getSetCookie().some((line) => line.includes('session-token'))).toBe(false);
  });
});
