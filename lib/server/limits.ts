import 'server-only';

/**
 * Every limit on requests, in one place; all are settings of ours. Rates are counted in the memory of one process: they start
 * again with it, and several processes count apart. The engine's limits on documents are in `engine/limits.ts`.
 */

/** Most bytes of a body, checked before it is read as JSON. */
export const BODY_BYTES = {
  /** anything but a study */
  small: 16 * 1024,
  /** a question of the open API: two rhythms and a chain */
  open: 64 * 1024,
  /** a study document and what travels with it */
  document: 2 * 1024 * 1024,
  /** a file of music to be read */
  music: 8 * 1024 * 1024,
} as const;

const SECOND = 1_000;
const MINUTE = 60 * SECOND;

/** Questions a minute to the open API from one address or account. */
function openRate(): number {
  const asked = Number(process.env.SESQUI_OPEN_RATE ?? '');
  return Number.isInteger(asked) && asked > 0 ? asked : 120;
}

/**
 * How often something may be done in a stretch of time, in milliseconds. Counted for the account, or where nobody is signed
 * in for the address that the request comes from.
 */
export const RATES = {
  /** saving a study: by itself it is saved less than once a second */
  save: { most: 120, within: MINUTE },
  /** new studies, copies included */
  create: { most: 60, within: MINUTE },
  /** any other change */
  change: { most: 120, within: MINUTE },
  /** questions to the open API; `SESQUI_OPEN_RATE` sets another number a minute */
  open: { most: openRate(), within: MINUTE },
  /** files of music read */
  music: { most: 60, within: MINUTE },
  /** files made from a study while somebody waits */
  file: { most: 120, within: MINUTE },
  /** prints asked for, each kept for a day */
  print: { most: 120, within: 60 * MINUTE },
  /** accounts made from one address */
  register: { most: 10, within: 60 * MINUTE },
  /** tries at one's present password, when changing it */
  password: { most: 10, within: 15 * MINUTE },
  /** tries at signing in, from one address for one account */
  signInFromAddress: { most: 10, within: 15 * MINUTE },
  /** tries at signing in to one account from anywhere, since a sender can lie about its address */
  signInFromAnywhere: { most: 50, within: 15 * MINUTE },
} as const;

export type Rate = (typeof RATES)[keyof typeof RATES];
export type RateName = keyof typeof RATES;

/** How long a file of music may be read, in milliseconds. */
export const READING_TIME = 10 * SECOND;
/** Most bytes of a compressed score, unpacked. */
export const UNPACKED_BYTES = 16 * 1024 * 1024;
/** Files of music that are read at once; further ones are told to come again. */
export const READINGS = 8;

/** Counts kept in memory at most for one rate; the oldest go first. */
export const COUNTS_KEPT = 20_000;
