import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import { CALLERS, newScene, type Caller, type Scene, type Statuses } from '../helpers/callers';
import { applicationDatabase } from '../helpers/people';
import { pages } from '../helpers/routes';

/** `to`: where a redirection leads */
type Case = { readonly of?: string; readonly at?: (scene: Scene) => string; readonly statuses: Statuses; readonly to?: string };

/** Statuses for nobody, student, teacher, composer, administrator, the owner, a stranger who has a study too. */
const EXPECTED: Record<string, readonly Case[]> = {
  '/': [{ statuses: [200, 200, 200, 200, 200, 200, 200] }],
  '/studies': [{ statuses: [200, 200, 200, 200, 200, 200, 200] }],
  // One page for every study: it asks GET /api/studies/[id] from the browser, which may hold a draft that must open without
  // an answer. So it stands for any name, and must tell nothing itself.
  '/studies/[id]': [
    { of: 'the owner’s', at: ({ study }) => study.id, statuses: [200, 200, 200, 200, 200, 200, 200] },
    { of: 'the owner’s, thrown away', at: ({ gone }) => gone.id, statuses: [200, 200, 200, 200, 200, 200, 200] },
    { of: 'a demo', at: () => 'lock-gates', statuses: [200, 200, 200, 200, 200, 200, 200] },
    { of: 'nothing', at: () => crypto.randomUUID(), statuses: [200, 200, 200, 200, 200, 200, 200] },
  ],
  // As the study's own page.
  '/studies/[id]/print': [
    { of: 'the owner’s', at: ({ study }) => study.id, statuses: [200, 200, 200, 200, 200, 200, 200] },
    { of: 'the owner’s, thrown away', at: ({ gone }) => gone.id, statuses: [200, 200, 200, 200, 200, 200, 200] },
    { of: 'a demo', at: () => 'lock-gates', statuses: [200, 200, 200, 200, 200, 200, 200] },
    { of: 'nothing', at: () => crypto.randomUUID(), statuses: [200, 200, 200, 200, 200, 200, 200] },
  ],
  '/proportions': [{ statuses: [200, 200, 200, 200, 200, 200, 200] }],
  '/check': [{ statuses: [200, 200, 200, 200, 200, 200, 200] }],
  '/open-api': [{ statuses: [200, 200, 200, 200, 200, 200, 200] }],
  '/sign-in': [{ statuses: [200, 307, 307, 307, 307, 307, 307], to: '/studies' }],
  '/register': [{ statuses: [200, 307, 307, 307, 307, 307, 307], to: '/studies' }],
  '/account': [{ statuses: [307, 200, 200, 200, 200, 200, 200], to: '/sign-in?next=/account' }],
  '/people': [{ statuses: [307, 404, 404, 404, 200, 404, 404], to: '/sign-in?next=/people' }],
};

let database: Database;
let pool: pg.Pool;
beforeAll(() => void ({ database, pool } = applicationDatabase()));
afterAll(() => pool.end());

/** One caller’s visit: the status, where it leads, and what it tells of the owner’s work, or others of the owner. */
async function visit(page: string, { at }: Case, caller: Caller) {
  const scene = await newScene(database, caller);
  const { status, body, headers } = await scene.reader.ask(page.replace('[id]', at?.(scene) ?? ''));
  const to = headers.get('location');
  const words = [scene.study.title, scene.gone.title, ...(caller === 'owner' ? [] : [scene.owner.email])];
  const where = to && new URL(to, 'http://x');
  return { status, to: where && where.pathname + where.search, tells: words.filter((word) => String(body).includes(word)) };
}

describe('pages', () => {
  it('all have expectations', () => {
    expect(pages()).toEqual(Object.keys(EXPECTED).sort());
  });
});

const cases = Object.entries(EXPECTED).flatMap(([page, list]) => list.map((one) => [page, one.of ?? 'everybody', one] as const));

describe.each(cases)('%s of %s', (page, _, one) => {
  it.each(CALLERS)('visited by %s', async (caller) => {
    const status = one.statuses[CALLERS.indexOf(caller)];
    expect(await visit(page, one, caller)).toEqual({ status, to: status === 307 ? one.to : null, tells: [] });
  });
});

describe('the page of people', () => {
  it('tells those who are no administrators no more than a page that is not there', async () => {
    const { owner, reader } = await newScene(database, 'student');
    const { status, body } = await reader.ask('/people');
    expect([status, String(body).includes(owner.email), String(body).includes('@sesqui.example')]).toEqual([404, false, false]);
  });
});
