import { afterEach, describe, expect, it, vi } from 'vitest';
import { ApiError, getJson } from '@/lib/client/get-json';
import { studyListQuery, studyQuery } from '@/lib/client/studies-queries';
import { studyListResponse, studyResponse, type StudyListWire, type StudyWire } from '@/lib/schemas/studies';
import { setting } from '../helpers/settings';

const at = (path: string) => new URL(path, setting('TEST_BASE_URL')).href;
const answer = (body: string, status: number) => vi.stubGlobal('fetch', async () => new Response(body, { status }));
afterEach(() => vi.unstubAllGlobals());

describe('getJson', () => {
  it('gives the body of a success', async () => {
    expect(await getJson(at('/api/health'))).toEqual({ ok: true });
  });

  it('throws a refusal with its code, sentence and fields', async () => {
    const sentence = "A study's name in an address has letters, digits and hyphens only.";
    await expect(getJson(at('/api/studies/a%20b'))).rejects.toEqual(new ApiError('invalid', sentence, 422, { id: sentence }));
    await expect(getJson(at('/api/studies/nothing'))).rejects.toMatchObject({ code: 'not_found', status: 404 });
  });

  it('says when no answer comes', async () => {
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('fetch failed')));
    await expect(getJson('/api/studies')).rejects.toMatchObject({ code: 'offline', status: 0 });
  });

  it.each([
    ['a page in place of data', '<h1>502</h1>', 502],
    ['a success that is no data', '<h1>Hello</h1>', 200],
    ['a refusal of another shape', '{"message":"no"}', 500],
  ])('says when it gets %s', async (_, body, status) => {
    answer(body, status);
    await expect(getJson('/api/studies')).rejects.toMatchObject({ code: 'unreadable', status });
  });

  it('leaves a request that was called off as it is', async () => {
    const control = new AbortController();
    control.abort();
    await expect(getJson(at('/api/health'), { signal: control.signal })).rejects.toMatchObject({ name: 'AbortError' });
  });
});

describe('the queries', () => {
  it('read what the API sends', async () => {
    const list = (await getJson(at('/api/studies'))) as StudyListWire;
    expect(studyListQuery().select?.(list)).toEqual(studyListResponse.parse(list).studies);
    const one = (await getJson(at('/api/studies/lock-gates'))) as StudyWire;
    expect(studyQuery('lock-gates').select?.(one)).toEqual(studyResponse.parse(one).study);
    expect(studyQuery('lock-gates').queryKey).toEqual(['studies', 'lock-gates']);
  });
});
