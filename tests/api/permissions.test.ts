import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '@/db/connect';
import { hashPassword } from '@/db/password';
import { OPEN_ROUTES } from '@/lib/schemas/open';
import { ACCESS, type Route } from '@/lib/server/access';
import type { Method } from '../helpers/api';
import { CALLERS, newScene, type Caller, type Scene, type Statuses } from '../helpers/callers';
import { smallStudy } from '../helpers/documents';
import { musicXML, note } from '../helpers/music-files';
import { applicationDatabase } from '../helpers/people';
import { handlers } from '../helpers/routes';
import { rowsOf } from '../helpers/rows';

const PASSWORD = 'osier-lock-9-pond';
const id = () => crypto.randomUUID();

type Case = {
  readonly of: string;
  readonly statuses: Statuses;
  /** what the address's `[id]` is */
  readonly at?: (scene: Scene) => string;
  readonly query?: string;
  readonly body?: (scene: Scene) => unknown;
  /** whose rows a success changes; nobody else's change, and nobody's do where it is left out */
  readonly changes?: 'caller' | 'owner';
  readonly needsPassword?: true;
  readonly kind?: string;
};

const study = ({ study }: Scene) => study.id;
const gone = ({ gone }: Scene) => gone.id;
const person = ({ owner }: Scene) => owner.id;
const demo = () => 'lock-gates';
const print = ({ prints }: Scene) => prints.own;
const guestPrint = ({ prints }: Scene) => prints.guest;
const sharedPrint = ({ prints }: Scene) => prints.shared;
const document = () => smallStudy('Otter');
const save = () => ({ document: document(), baseVersion: 1, saveId: id() });
const title = () => ({ title: 'Otter', baseVersion: 1 });
const another = () => ({ name: 'Otter', email: `${id()}@sesqui.example`, password: PASSWORD, role: 'student' });
const password = () => ({ current: PASSWORD, next: `${PASSWORD}-2` });

/** Statuses for nobody, student, teacher, composer, administrator, the owner, a stranger who has a study too. */
const EXPECTED: Record<Route, readonly Case[]> = {
  'GET /api/health': [{ of: 'the application', statuses: [200, 200, 200, 200, 200, 200, 200] }],
  'GET /api/openapi.json': [{ of: 'the open API', statuses: [200, 200, 200, 200, 200, 200, 200] }],
  'POST /api/transform': [{ of: 'nobody’s rows', statuses: [200, 200, 200, 200, 200, 200, 200], body: () => OPEN_ROUTES.transform.example }],
  'POST /api/check': [{ of: 'nobody’s rows', statuses: [200, 200, 200, 200, 200, 200, 200], body: () => OPEN_ROUTES.check.example }],
  'POST /api/find': [{ of: 'nobody’s rows', statuses: [200, 200, 200, 200, 200, 200, 200], body: () => OPEN_ROUTES.find.example }],
  'POST /api/proportions/[calculator]': [
    { of: 'nobody’s rows', statuses: [200, 200, 200, 200, 200, 200, 200], at: () => 'lengths', body: () => OPEN_ROUTES.lengths.example },
    { of: 'what is no calculator', statuses: [404, 404, 404, 404, 404, 404, 404], at: () => 'toString', body: () => ({}) },
  ],
  'POST /api/read-music': [{ of: 'nobody’s rows', statuses: [200, 200, 200, 200, 200, 200, 200], body: () => musicXML([note(4)]), kind: 'application/xml' }],
  'POST /api/register': [{ of: 'a new account', statuses: [201, 201, 201, 201, 201, 201, 201], body: another }],

  'GET /api/account': [{ of: 'one’s own', statuses: [401, 200, 200, 200, 200, 200, 200] }],
  'PATCH /api/account': [{ of: 'one’s own', statuses: [401, 200, 200, 200, 200, 200, 200], body: () => ({ name: 'Otter' }), changes: 'caller' }],
  'POST /api/account/password': [
    { of: 'one’s own', statuses: [401, 200, 200, 200, 200, 200, 200], body: password, changes: 'caller', needsPassword: true },
  ],
  'POST /api/account/sign-out-everywhere': [{ of: 'one’s own', statuses: [401, 200, 200, 200, 200, 200, 200], changes: 'caller' }],

  'GET /api/people': [{ of: 'everybody', statuses: [401, 403, 403, 403, 200, 403, 403] }],
  'PATCH /api/people/[id]': [
    { of: 'the owner', statuses: [401, 403, 403, 403, 200, 403, 403], at: person, body: () => ({ role: 'student' }), changes: 'owner' },
    { of: 'the owner’s account, closed', statuses: [401, 403, 403, 403, 200, 403, 403], at: person, body: () => ({ disabled: true }), changes: 'owner' },
  ],

  'GET /api/studies': [
    { of: 'the demo', statuses: [200, 200, 200, 200, 200, 200, 200] },
    { of: 'one’s own', statuses: [401, 200, 200, 200, 200, 200, 200], query: '?list=own' },
    { of: 'one’s own, thrown away', statuses: [401, 200, 200, 200, 200, 200, 200], query: '?list=own&deleted=true' },
  ],
  'POST /api/studies': [{ of: 'one’s own', statuses: [401, 201, 201, 201, 201, 201, 201], body: () => ({ document: document(), saveId: id() }), changes: 'caller' }],
  'GET /api/studies/[id]': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'PUT /api/studies/[id]': [
    { of: 'the owner’s', statuses: [401, 404, 404, 404, 404, 200, 404], at: study, body: save, changes: 'owner' },
    { of: 'the owner’s, thrown away', statuses: [401, 404, 404, 404, 404, 404, 404], at: gone, body: save },
    { of: 'a demo', statuses: [401, 403, 403, 403, 403, 403, 403], at: demo, body: save },
  ],
  'PATCH /api/studies/[id]': [
    { of: 'the owner’s', statuses: [401, 404, 404, 404, 404, 200, 404], at: study, body: title, changes: 'owner' },
    { of: 'the owner’s, thrown away', statuses: [401, 404, 404, 404, 404, 404, 404], at: gone, body: title },
    { of: 'a demo', statuses: [401, 403, 403, 403, 403, 403, 403], at: demo, body: title },
  ],
  'DELETE /api/studies/[id]': [
    { of: 'the owner’s', statuses: [401, 404, 404, 404, 404, 200, 404], at: study, changes: 'owner' },
    { of: 'the owner’s, thrown away', statuses: [401, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [401, 403, 403, 403, 403, 403, 403], at: demo },
  ],
  'POST /api/studies/[id]/copy': [
    { of: 'the owner’s', statuses: [401, 404, 404, 404, 404, 201, 404], at: study, body: () => ({}), changes: 'caller' },
    { of: 'the owner’s, thrown away', statuses: [401, 404, 404, 404, 404, 404, 404], at: gone, body: () => ({}) },
    { of: 'a demo', statuses: [401, 201, 201, 201, 201, 201, 201], at: demo, body: () => ({}), changes: 'caller' },
  ],
  'POST /api/studies/[id]/restore': [
    { of: 'the owner’s', statuses: [401, 404, 404, 404, 404, 404, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [401, 404, 404, 404, 404, 200, 404], at: gone, changes: 'owner' },
    { of: 'a demo', statuses: [401, 404, 404, 404, 404, 404, 404], at: demo },
  ],
  'GET /api/studies/[id]/versions': [
    { of: 'the owner’s', statuses: [401, 404, 404, 404, 404, 200, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [401, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [401, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'GET /api/studies/[id]/versions/[version]': [
    { of: 'the owner’s', statuses: [401, 404, 404, 404, 404, 200, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [401, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [401, 200, 200, 200, 200, 200, 200], at: demo },
  ],

  'GET /api/studies/[id]/score.json': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'GET /api/studies/[id]/score.musicxml': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'GET /api/studies/[id]/score.mxl': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'GET /api/studies/[id]/score.mid': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'GET /api/studies/[id]/statements.csv': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'GET /api/studies/[id]/score.pdf': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study, changes: 'owner' },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'GET /api/studies/[id]/parts.zip': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study, changes: 'owner' },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'GET /api/studies/[id]/parts/[file]': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: study, changes: 'owner' },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], at: gone },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: demo },
  ],
  'POST /api/exports': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 202, 404], body: ({ study }) => ({ what: 'score', study: study.id }), changes: 'caller' },
    { of: 'the owner’s, thrown away', statuses: [404, 404, 404, 404, 404, 404, 404], body: ({ gone }) => ({ what: 'score', study: gone.id }) },
    { of: 'a demo', statuses: [202, 202, 202, 202, 202, 202, 202], body: () => ({ what: 'score', study: 'lock-gates' }), changes: 'caller' },
    { of: 'a document', statuses: [202, 202, 202, 202, 202, 202, 202], body: () => ({ what: 'score', document: document() }), changes: 'caller' },
  ],
  'GET /api/exports/[id]': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: print },
    { of: 'a guest’s, without its token', statuses: [404, 404, 404, 404, 404, 404, 404], at: guestPrint },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: sharedPrint },
  ],
  'DELETE /api/exports/[id]': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: print },
    { of: 'a guest’s, without its token', statuses: [404, 404, 404, 404, 404, 404, 404], at: guestPrint },
    { of: 'a demo', statuses: [403, 403, 403, 403, 403, 403, 403], at: sharedPrint },
  ],
  'GET /api/exports/[id]/file': [
    { of: 'the owner’s', statuses: [404, 404, 404, 404, 404, 200, 404], at: print },
    { of: 'a guest’s, without its token', statuses: [404, 404, 404, 404, 404, 404, 404], at: guestPrint },
    { of: 'a demo', statuses: [200, 200, 200, 200, 200, 200, 200], at: sharedPrint },
  ],
};

let database: Database;
let pool: pg.Pool;
let passwordHash: string;
beforeAll(async () => {
  ({ database, pool } = applicationDatabase());
  passwordHash = await hashPassword(PASSWORD);
});
afterAll(() => pool.end());

/** What an answer to anybody but the owner must not hold: that the owner’s studies exist, and what they are called. */
const tellsOf = (text: string, { study, gone }: Scene) => [study.id, gone.id, study.title, gone.title].some((word) => text.includes(word));

/** One caller’s try: the status, and whose rows it changed. */
async function attempt(route: Route, { at, query = '', body, needsPassword, kind }: Case, caller: Caller) {
  const scene = await newScene(database, caller, needsPassword && passwordHash);
  const { owner, callerId, reader } = scene;
  const before = { owner: await rowsOf(pool, owner.id), caller: callerId && (await rowsOf(pool, callerId)) };
  const [method, pattern = ''] = route.split(' ');
  const path = pattern.replace(/\[(?:id|calculator)\]/, at?.(scene) ?? '').replace('[version]', '1').replace('[file]', () => `${at === demo ? 'p1' : 'one'}.pdf`);
  const answer = await reader.send(method as Method, path + query, method === 'GET' ? undefined : body?.(scene), kind === undefined ? {} : { 'content-type': kind });
  const after = { owner: await rowsOf(pool, owner.id), caller: callerId && (await rowsOf(pool, callerId)) };
  const isChanged = (of: 'owner' | 'caller') => JSON.stringify(before[of]) !== JSON.stringify(after[of]);
  const tells = caller !== 'owner' && tellsOf(JSON.stringify(answer.body), scene);
  return { status: answer.status, changes: { owner: isChanged('owner'), caller: isChanged('caller') }, tells };
}

/** What the table says of one caller: a refusal changes nothing, a success what is allowed and no more. */
function expected({ statuses, changes }: Case, caller: Caller) {
  const status = statuses[CALLERS.indexOf(caller)]!;
  const isDone = status < 300 && changes !== undefined;
  const [owner, self] = [isDone && changes === 'owner', isDone && changes === 'caller' && caller !== 'nobody'];
  // The owner who calls is both.
  return { status, changes: caller === 'owner' ? { owner: owner || self, caller: owner || self } : { owner, caller: self }, tells: false };
}

describe('the table of access', () => {
  it('has a row for every handler, and no other', () => {
    expect(handlers()).toEqual(Object.keys(ACCESS).sort());
  });

  it('has expectations for every row, and no other', () => {
    expect(Object.keys(EXPECTED).sort()).toEqual(Object.keys(ACCESS).sort());
    for (const [route, cases] of Object.entries(EXPECTED)) expect([route, cases.length]).not.toEqual([route, 0]);
  });

  it('lets in whom its rows name: nobody signed out where it says so, administrators alone where it says so', () => {
    for (const [route, { who }] of Object.entries(ACCESS)) {
      const firsts = EXPECTED[route as Route].map(({ statuses }) => statuses);
      const refusesNobody = firsts.every(([nobody]) => nobody === 401);
      expect([route, refusesNobody]).toEqual([route, who !== 'anybody']);
      const refusesRoles = firsts.every(([, student, teacher, composer]) => [student, teacher, composer].every((status) => status === 403));
      expect([route, refusesRoles]).toEqual([route, Array.isArray(who)]);
    }
  });
});

const cases = Object.entries(EXPECTED).flatMap(([route, list]) => list.map((one) => [route as Route, one.of, one] as const));

describe.each(cases)('%s of %s', (route, _, one) => {
  it.each(CALLERS)('asked by %s', async (caller) => {
    expect(await attempt(route, one, caller)).toEqual(expected(one, caller));
  });
});
