import { describe, expect, it } from 'vitest';
import { demoStudies } from '@/db/demo';
import { parseStudy } from '@/engine';
import { studyListResponse, studyResponse, type StudyListWire, type StudyWire } from '@/lib/schemas/studies';
import { ask } from '../helpers/api';

const refusal = (code: string, message: string, fields?: Record<string, string>) => ({ error: { code, message, ...(fields && { fields }) } });
const badCharacters = "A study's name in an address has letters, digits and hyphens only.";
const tooLong = "A study's name in an address has at most 64 characters.";
const notFound = refusal('not_found', 'There is no such study, or it is not yours to open.');

describe('GET /api/studies', () => {
  it('lists the demo studies by title, without their documents', async () => {
    const { status, body } = await ask('/api/studies');
    expect(status).toBe(200);
    const { studies } = body as StudyListWire;
    const byTitle = [...demoStudies].sort((a, b) => (a.study.title < b.study.title ? -1 : 1));
    expect(studies.map(({ slug, title, summary }) => ({ slug, title, summary }))).toEqual(
      byTitle.map(({ slug, study, summary }) => ({ slug, title: study.title, summary })),
    );
    for (const study of studies) expect(Object.keys(study)).toEqual([
      'id', 'slug', 'title', 'summary', 'version', 'createdAt', 'updatedAt', 'deletedAt', 'measures', 'seconds', 'strip',
    ]);
    expect(studyListResponse.parse(body).studies[0]!.updatedAt).toBeInstanceOf(Date);
  });
});

describe('GET /api/studies/[id]', () => {
  it.each(demoStudies)('gives the demo $slug to anybody, by readable name and by id', async ({ slug, study }) => {
    const { status, body, headers } = await ask(`/api/studies/${slug}`);
    expect(status).toBe(200);
    expect(headers.get('cache-control')).toBe('no-store');
    const wire = (body as StudyWire).study;
    expect(Object.keys(wire)).toEqual(['id', 'slug', 'title', 'version', 'document', 'updatedAt', 'isDemo']);
    expect(studyResponse.parse(body).study).toMatchObject({ slug, title: study.title, version: 1, isDemo: true, document: parseStudy(study) });
    expect((await ask(`/api/studies/${wire.id}`)).body).toEqual(body);
  });

  it.each([
    ['a name that is not there', 'nothing', 404, notFound],
    ['an id that is not there', '00000000-0000-4000-8000-000000000000', 404, notFound],
    ['64 characters', 'a'.repeat(64), 404, notFound],
    ['65 characters', 'a'.repeat(65), 422, refusal('invalid', tooLong, { id: tooLong })],
    ['4,000 characters', 'a'.repeat(4000), 422, refusal('invalid', tooLong, { id: tooLong })],
    ['a space', 'lock%20gates', 422, refusal('invalid', badCharacters, { id: badCharacters })],
    ['a quotation mark', "lock-gates'", 422, refusal('invalid', badCharacters, { id: badCharacters })],
    ['a path upwards', '..%2f..%2fetc', 422, refusal('invalid', badCharacters, { id: badCharacters })],
    ['a zero byte', 'lock%00gates', 422, refusal('invalid', badCharacters, { id: badCharacters })],
    ['another alphabet', '%D1%88%D0%BB%D1%8E%D0%B7', 422, refusal('invalid', badCharacters, { id: badCharacters })],
  ])('refuses %s', async (_, id, status, body) => {
    expect(await ask(`/api/studies/${id}`)).toMatchObject({ status, body });
  });

  it('does not take POST', async () => {
    expect((await ask('/api/studies/lock-gates', { method: 'POST' })).status).toBe(405);
  });
});
