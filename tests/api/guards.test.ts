import { beforeEach, describe, expect, it, vi } from 'vitest';
import { getCurrentUser, type CurrentUser } from '@/lib/server/current-user';
import { requireSameOrigin } from '@/lib/server/same-origin';
import { SignInLimit } from '@/lib/server/sign-in-limit';
import { withPublic } from '@/lib/server/with-public';
import { withUser } from '@/lib/server/with-user';

vi.mock('@/lib/server/current-user', () => ({ getCurrentUser: vi.fn() }));

const wren: CurrentUser = { id: 'u1', name: 'Wren', email: 'wren@sesqui.example', role: 'student' };
const context = { params: Promise.resolve({ id: 'weir' }) };
const request = (method: string, headers: Record<string, string> = {}) =>
  new Request('http://127.0.0.1:3000/api/studies', { method, headers: { host: '127.0.0.1:3000', ...headers } });

beforeEach(() => void vi.mocked(getCurrentUser).mockResolvedValue(null));

describe('withUser', () => {
  const handler = withUser(async ({ user, params }) => Response.json({ user: user.id, params }));

  it('refuses nobody in particular with 401', async () => {
    const response = await handler(request('GET'), context);
    expect([response.status, await response.json()]).toEqual([401, { error: { code: 'unauthorized', message: 'Sign in first.' } }]);
  });

  it('hands the handler who is signed in, and the address’s parts', async () => {
    vi.mocked(getCurrentUser).mockResolvedValue(wren);
    const response = await handler(request('GET'), context);
    expect([response.status, await response.json()]).toEqual([200, { user: 'u1', params: { id: 'weir' } }]);
  });
});

describe('withPublic', () => {
  it('turns what a handler throws into an answer', async () => {
    const response = await withPublic(async ({ req }) => Response.json(await req.json()))(request('GET'), context);
    expect(response.status).toBe(400);
  });

  it('refuses a changing request from another site before the handler sees it', async () => {
    const handler = vi.fn(async () => new Response());
    const response = await withPublic(handler)(request('POST', { 'sec-fetch-site': 'cross-site' }), context);
    expect(response.status).toBe(403);
    expect(handler).not.toHaveBeenCalled();
  });
});

describe('requireSameOrigin', () => {
  const own = 'http://127.0.0.1:3000';
  it.each([
    ['GET', { 'sec-fetch-site': 'cross-site', origin: 'https://elsewhere.example' }],
    ['POST', {}],
    ['POST', { 'sec-fetch-site': 'same-origin', origin: own }],
    ['DELETE', { 'sec-fetch-site': 'none' }],
    ['PUT', { origin: own }],
  ])('lets %s with %j through', (method, headers) => {
    expect(() => requireSameOrigin(request(method, headers))).not.toThrow();
  });

  it.each([
    ['POST', { 'sec-fetch-site': 'cross-site' }],
    ['POST', { 'sec-fetch-site': 'same-site', origin: own }],
    ['PUT', { origin: 'https://elsewhere.example' }],
    ['PATCH', { origin: 'null' }],
    ['DELETE', { 'sec-fetch-site': 'same-origin', origin: 'http://127.0.0.1:3001' }],
  ])('refuses %s with %j', (method, headers) => {
    expect(() => requireSameOrigin(request(method, headers))).toThrow('This request came from another site and was not carried out.');
  });
});

describe('SignInLimit', () => {
  const minute = 60_000;
  const tries = (limit: SignInLimit, count: number, address: string, now: number) =>
    Array.from({ length: count }, () => limit.allow(address, 'a@sesqui.example', now)).filter(Boolean).length;

  it('allows ten tries in fifteen minutes for an address and an account, then begins again', () => {
    const limit = new SignInLimit();
    expect(tries(limit, 12, 'here', 0)).toBe(10);
    expect(tries(limit, 1, 'here', 15 * minute - 1)).toBe(0);
    expect(tries(limit, 12, 'here', 15 * minute)).toBe(10);
  });

  it('begins again after the right password', () => {
    const limit = new SignInLimit();
    tries(limit, 9, 'here', 0);
    limit.succeed('here', 'a@sesqui.example');
    expect(tries(limit, 12, 'here', 0)).toBe(10);
  });

  it('allows fifty for an account, however many addresses the sender claims', () => {
    const limit = new SignInLimit();
    const allowed = Array.from({ length: 80 }, (_, i) => tries(limit, 1, `sender ${i}`, 0));
    expect(allowed.reduce((a, b) => a + b, 0)).toBe(50);
  });

  it('does not count right passwords against an account', () => {
    const limit = new SignInLimit();
    for (let i = 0; i < 200; i += 1) {
      expect(limit.allow(`sender ${i}`, 'a@sesqui.example', 0)).toBe(true);
      limit.succeed(`sender ${i}`, 'a@sesqui.example');
    }
  });
});
