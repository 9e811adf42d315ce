import { beforeEach, describe, expect, it, vi } from 'vitest';
import { getCurrentUser, type CurrentUser } from '@/lib/server/current-user';
import { requireSameOrigin } from '@/lib/server/same-origin';
import { SignInLimit } from '@/lib/server/sign-in-limit';
import { withPublic, withUser } from '@/lib/server/with-access';

vi.mock('@/lib/server/current-user', () => ({ getCurrentUser: vi.fn() }));

const wren: CurrentUser = { id: 'u1', name: 'Wren', email: 'wren@sesqui.example', role: 'student', sessionEpoch: 0 };
const context = { params: Promise.resolve({ id: 'weir' }) };
const request = (method: string, headers: Record<string, string> = {}) =>
  new Request('http://127.0.0.1:3000/api/studies', { method, headers: { host: '127.0.0.1:3000', ...headers } });

beforeEach(() => void vi.mocked(getCurrentUser).mockResolvedValue(null));

const json = { 'content-type': 'application/json' };
const sent = (method: string, body: string, headers: Record<string, string> = json) =>
  new Request('http://127.0.0.1:3000/api/account', { method, body, headers: { host: '127.0.0.1:3000', ...headers } });
const answerOf = async (response: Response) => [response.status, await response.json()];
const refusal = (status: number, code: string, message: string) => [status, { error: { code, message } }];

describe('withUser', () => {
  const handler = withUser('GET /api/account', async ({ user, params, query }) => Response.json({ user: user.id, params, query }));

  it('refuses nobody in particular with 401', async () => {
    expect(await answerOf(await handler(request('GET'), context))).toEqual(refusal(401, 'unauthorized', 'Sign in first.'));
  });

  it('hands the handler who is signed in, and the address’s parts', async () => {
    vi.mocked(getCurrentUser).mockResolvedValue(wren);
    expect(await answerOf(await handler(request('GET'), context))).toEqual([200, { user: 'u1', params: { id: 'weir' }, query: {} }]);
  });

  it('refuses a role that the table of access does not name', async () => {
    const people = withUser('GET /api/people', async () => Response.json({ ok: true }));
    for (const [role, status] of [['student', 403], ['teacher', 403], ['composer', 403], ['administrator', 200]] as const) {
      vi.mocked(getCurrentUser).mockResolvedValue({ ...wren, role });
      expect([role, (await people(request('GET'), context)).status]).toEqual([role, status]);
    }
  });
});

describe('withPublic', () => {
  const handler = vi.fn(async () => Response.json({ ok: true }));
  const register = withPublic('POST /api/register', handler);
  let sender = 0;
  beforeEach(() => void (sender += 1));
  const from = (headers: Record<string, string> = json) => ({ ...headers, 'x-forwarded-for': `198.51.100.${sender}` });

  it.each([
    ['another site', { ...json, 'sec-fetch-site': 'cross-site' }, '{}', 403, 'forbidden'],
    ['a form', { 'content-type': 'application/x-www-form-urlencoded' }, 'a=b', 415, 'wrong_type'],
    ['plain text', { 'content-type': 'text/plain' }, '{}', 415, 'wrong_type'],
    ['what is no JSON', json, '{', 400, 'unreadable'],
    ['more than it takes', json, JSON.stringify('x'.repeat(16 * 1024)), 413, 'too_large'],
  ])('refuses a change from %s before the handler sees it', async (_, headers, body, status, code) => {
    handler.mockClear();
    const response = await register(sent('POST', body, from(headers)), context);
    expect([response.status, await response.json()]).toMatchObject([status, { error: { code } }]);
    expect(handler).not.toHaveBeenCalled();
  });

  it('takes a body of exactly the limit, and refuses one of a byte more that does not tell its length', async () => {
    const body = (bytes: number) => JSON.stringify('x'.repeat(bytes - 2));
    expect((await register(sent('POST', body(16 * 1024), from()), context)).status).toBe(200);
    const stream = new Blob([body(16 * 1024 + 1)]).stream();
    const request = new Request('http://127.0.0.1:3000/api/register', { method: 'POST', body: stream, headers: { host: '127.0.0.1:3000', ...from() }, duplex: 'half' } as RequestInit);
    expect((await register(request, context)).status).toBe(413);
  });

  it('refuses text that is no UTF-8', async () => {
    const request = new Request('http://127.0.0.1:3000/api/register', { method: 'POST', body: new Uint8Array([0x22, 0xff, 0x22]), headers: { host: '127.0.0.1:3000', ...from() } });
    expect((await register(request, context)).status).toBe(400);
  });

  it('lets one address make ten accounts an hour, and tells the eleventh to wait', async () => {
    const statuses = [];
    for (let i = 0; i < 11; i += 1) statuses.push((await register(sent('POST', '{}', from()), context)).status);
    expect(statuses).toEqual([...Array.from({ length: 10 }, () => 200), 429]);
  });

  it('counts saves for the account, 120 a minute', async () => {
    const save = withUser('PUT /api/studies/[id]', async () => Response.json({ ok: true }));
    const tries = async (id: string) => {
      vi.mocked(getCurrentUser).mockResolvedValue({ ...wren, id });
      return (await save(sent('PUT', '{}'), context)).status;
    };
    for (let i = 0; i < 120; i += 1) expect(await tries('busy')).toBe(200);
    expect([await tries('busy'), await tries('other')]).toEqual([429, 200]);
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
