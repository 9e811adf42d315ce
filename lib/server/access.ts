import 'server-only';
import type { UserRole } from '@/db/queries/users';
import { BODY_BYTES, type RateName } from './limits';

/** Who may call a handler at all; whose row it is stands in the query. */
type Who = 'anybody' | 'signed-in' | readonly UserRole[];

export type Access = {
  readonly who: Who;
  /** whose rows it reads or changes: one's own, one's own or a demo, none of anybody's work */
  readonly rows: 'own' | 'own or demo' | 'demo' | 'people' | 'none';
  readonly rate?: RateName;
  /** most bytes of the body, which is JSON; without it, no body is read */
  readonly body?: number;
  /** in place of JSON, a file: its most bytes, and the kinds that it may be sent as */
  readonly file?: { readonly most: number; readonly kinds: readonly string[] };
};

const { small, document, open, music } = BODY_BYTES;

/** Kinds of files of music; none of them can a form of another site send. */
const MUSIC = ['application/vnd.recordare.musicxml+xml', 'application/vnd.recordare.musicxml', 'application/xml', 'text/xml', 'audio/midi', 'audio/x-midi', 'audio/mid', 'application/zip', 'application/octet-stream'];

/**
 * Who may what: every handler, and what guards it. A handler without a row does not compile; a row or a handler without
 * expectations for each role, the owner, a stranger and nobody fails `tests/api/permissions.test.ts`. No role may read,
 * change or delete another's study: administrators included.
 */
export const ACCESS = {
  'GET /api/health': { who: 'anybody', rows: 'none' },
  'POST /api/register': { who: 'anybody', rows: 'none', rate: 'register', body: small },

  'GET /api/openapi.json': { who: 'anybody', rows: 'none' },
  'POST /api/transform': { who: 'anybody', rows: 'none', rate: 'open', body: open },
  'POST /api/check': { who: 'anybody', rows: 'none', rate: 'open', body: open },
  'POST /api/find': { who: 'anybody', rows: 'none', rate: 'open', body: open },
  'POST /api/proportions/[calculator]': { who: 'anybody', rows: 'none', rate: 'open', body: open },
  'POST /api/read-music': { who: 'anybody', rows: 'none', rate: 'music', file: { most: music, kinds: MUSIC } },

  'GET /api/account': { who: 'signed-in', rows: 'own' },
  'PATCH /api/account': { who: 'signed-in', rows: 'own', rate: 'change', body: small },
  'POST /api/account/password': { who: 'signed-in', rows: 'own', rate: 'password', body: small },
  'POST /api/account/sign-out-everywhere': { who: 'signed-in', rows: 'own', rate: 'change' },

  'GET /api/people': { who: ['administrator'], rows: 'people' },
  'PATCH /api/people/[id]': { who: ['administrator'], rows: 'people', rate: 'change', body: small },

  /** `?list=own` asks for a signed-in reader */
  'GET /api/studies': { who: 'anybody', rows: 'own or demo' },
  'POST /api/studies': { who: 'signed-in', rows: 'own', rate: 'create', body: document },
  'GET /api/studies/[id]': { who: 'anybody', rows: 'own or demo' },
  'PUT /api/studies/[id]': { who: 'signed-in', rows: 'own', rate: 'save', body: document },
  'PATCH /api/studies/[id]': { who: 'signed-in', rows: 'own', rate: 'change', body: small },
  'DELETE /api/studies/[id]': { who: 'signed-in', rows: 'own', rate: 'change' },
  'POST /api/studies/[id]/copy': { who: 'signed-in', rows: 'own or demo', rate: 'create', body: small },
  'POST /api/studies/[id]/restore': { who: 'signed-in', rows: 'own', rate: 'change' },
  'GET /api/studies/[id]/versions': { who: 'signed-in', rows: 'own or demo' },
  'GET /api/studies/[id]/versions/[version]': { who: 'signed-in', rows: 'own or demo' },

  'GET /api/studies/[id]/score.json': { who: 'anybody', rows: 'own or demo', rate: 'file' },
  'GET /api/studies/[id]/score.musicxml': { who: 'anybody', rows: 'own or demo', rate: 'file' },
  'GET /api/studies/[id]/score.mxl': { who: 'anybody', rows: 'own or demo', rate: 'file' },
  'GET /api/studies/[id]/score.mid': { who: 'anybody', rows: 'own or demo', rate: 'file' },
  'GET /api/studies/[id]/statements.csv': { who: 'anybody', rows: 'own or demo', rate: 'file' },
  'GET /api/studies/[id]/score.pdf': { who: 'anybody', rows: 'own or demo', rate: 'file' },
  'GET /api/studies/[id]/parts.zip': { who: 'anybody', rows: 'own or demo', rate: 'file' },
  'GET /api/studies/[id]/parts/[file]': { who: 'anybody', rows: 'own or demo', rate: 'file' },
  /** a print belongs to the account, or to the guest who shows its token; one of a demo that GET …/score.pdf asked for is anybody's */
  'POST /api/exports': { who: 'anybody', rows: 'own or demo', rate: 'print', body: document },
  'GET /api/exports/[id]': { who: 'anybody', rows: 'own or demo' },
  'DELETE /api/exports/[id]': { who: 'anybody', rows: 'own', rate: 'change' },
  'GET /api/exports/[id]/file': { who: 'anybody', rows: 'own or demo' },
} as const satisfies Record<string, Access>;

export type Route = keyof typeof ACCESS;
/** The routes that only somebody who is signed in may call. */
export type SignedInRoute = { [K in Route]: (typeof ACCESS)[K]['who'] extends 'anybody' ? never : K }[Route];
