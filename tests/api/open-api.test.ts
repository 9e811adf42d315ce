import { describe, expect, it } from 'vitest';
import { CASES_OF_CHECK } from '../helpers/open-cases';
import { OPEN_ROUTES } from '@/lib/schemas/open';
import { Reader } from '../helpers/api';

const ask = (path: string, body: unknown, reader = new Reader()) => reader.send('POST', path, body);

describe('the open API', () => {
  it.each(Object.values(OPEN_ROUTES).map(({ path, example, response }) => [path, example, response] as const))('%s answers its own example', async (path, example, response) => {
    const { status, body, headers } = await ask(path, example);
    expect([status, headers.get('content-type')]).toEqual([200, 'application/json']);
    expect(response.safeParse(body).error).toBeUndefined();
  });

  it.each(CASES_OF_CHECK)('%s', async (_, path, body, expected) => {
    const answer = await ask(path, body);
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject(expected);
  });

  it.each<[what: string, path: string, body: unknown, status: number, code: string]>([
    ['no JSON', '/api/transform', '{', 400, 'unreadable'],
    ['a field too many', '/api/transform', { rhythm: '1/4', steps: [], more: 1 }, 422, 'invalid'],
    ['a number where text is expected', '/api/transform', { rhythm: 4, steps: [] }, 422, 'invalid'],
    ['an unreadable rhythm', '/api/transform', { rhythm: '1/4 x', steps: [] }, 422, 'invalid_rhythm'],
    ['a factor of 0', '/api/transform', { rhythm: '1/4', steps: [{ kind: 'augment', factor: '0' }] }, 422, 'invalid_factor'],
    ['a rhythm beyond the limit of the open API', '/api/find', { from: '1/4 '.repeat(6_000), to: '1/4' }, 422, 'invalid'],
    ['a body beyond the limit', '/api/find', { from: 'x'.repeat(70_000), to: '1/4' }, 413, 'too_large'],
    ['33 steps', '/api/transform', { rhythm: '1/4', steps: Array.from({ length: 33 }, () => ({ kind: 'retrograde', by: 'values' })) }, 422, 'invalid'],
    ['a length of 0', '/api/proportions/lengths', { lengths: ['4', '0'] }, 422, 'invalid_argument'],
    ['what is no fraction', '/api/proportions/alignment', { cycles: ['drei'] }, 422, 'invalid_fraction'],
    ['an unknown calculator', '/api/proportions/horoscope', {}, 404, 'not_found'],
  ])('%s is refused', async (_, path, body, status, code) => {
    const answer = await ask(path, body);
    expect([answer.status, (answer.body as { error: { code: string } }).error.code]).toEqual([status, code]);
    expect((answer.body as { error: { message: string } }).error.message).toMatch(/^[A-Z“].*[.?]$/);
  });

  it('120 questions a minute from one address; the excess is told to wait, and another address is served', async () => {
    const busy = new Reader();
    const { path, example } = OPEN_ROUTES.lengths;
    const statuses: number[] = [];
    for (let n = 0; n < 125; n += 1) statuses.push((await ask(path, example, busy)).status);
    expect(statuses.slice(0, 120).every((status) => status === 200)).toBe(true);
    expect(statuses.slice(120)).toEqual([429, 429, 429, 429, 429]);
    const refused = await ask(path, example, busy);
    expect(refused.body).toEqual({ error: { code: 'too_many', message: 'This was tried too often. Wait a minute and try again; nothing is lost.' } });
    expect((await ask(path, example)).status).toBe(200);
  });
});

describe('the OpenAPI document', () => {
  it('is 3.1, names every question, and its examples fit its schemas', async () => {
    const { status, body } = await new Reader().ask('/api/openapi.json');
    const document = body as { openapi: string; paths: Record<string, { post: { requestBody: { content: { 'application/json': { schema: object; example: unknown } } }; responses: Record<string, object> } }> };
    expect([status, document.openapi]).toEqual([200, '3.1.0']);
    expect(Object.keys(document.paths)).toEqual(Object.values(OPEN_ROUTES).map(({ path }) => path));
    for (const { path, body: schema, example } of Object.values(OPEN_ROUTES)) {
      const { post } = document.paths[path]!;
      expect(schema.safeParse(post.requestBody.content['application/json'].example).success).toBe(true);
      expect(post.requestBody.content['application/json'].example).toEqual(example);
      expect(post.requestBody.content['application/json'].schema).toMatchObject({ type: 'object', additionalProperties: false });
      expect(Object.keys(post.responses)).toEqual(['200', '400', '403', '413', '415', '422', '429']);
    }
  });
});
