import { randomBytes, scrypt, timingSafeEqual, type ScryptOptions } from 'node:crypto';

/**
 * Cost of a password hash: scrypt with N = 2^17, r = 8, p = 1, 128 MiB a hash.
 * @see OWASP, Password Storage Cheat Sheet, “scrypt”: the first of its equivalent settings
 */
const COST = { logN: 17, r: 8, p: 1 } as const;
const KEY_BYTES = 32;
const SALT_BYTES = 16;
/** Hashes at once; more wait, so that a flood of sign-ins cannot take all memory. */
const AT_ONCE = 2;

let running = 0;
const waiting: (() => void)[] = [];

async function derive(password: string, salt: Buffer, logN: number, r: number, p: number): Promise<Buffer> {
  // A slot that is given up passes straight to the next in line, so `running` only changes when nobody waits.
  if (running >= AT_ONCE) await new Promise<void>((go) => waiting.push(go));
  else running += 1;
  const N = 2 ** logN;
  const options: ScryptOptions = { N, r, p, maxmem: 128 * N * r * p + 1024 * 1024 };
  try {
    return await new Promise((resolve, reject) => {
      scrypt(password.normalize('NFKC'), salt, KEY_BYTES, options, (error, key) => (error ? reject(error) : resolve(key)));
    });
  } finally {
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

/** @returns `scrypt$17$8$1$salt$hash`, salt and hash in base64 */
export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(SALT_BYTES);
  const key = await derive(password, salt, COST.logN, COST.r, COST.p);
  return ['scrypt', COST.logN, COST.r, COST.p, salt.toString('base64'), key.toString('base64')].join('$');
}

/**
 * Whether a password belongs to a hash. Takes as long where there is no hash (no such account, or one without a password),
 * so that the time of the answer tells nothing; the answer is then false.
 */
export async function verifyPassword(password: string, hash: string | null | undefined): Promise<boolean> {
  const [scheme, logN, r, p, salt, key] = (hash ?? '').split('$');
  if (scheme !== 'scrypt' || !logN || !r || !p || !salt || !key) {
    await derive(password, randomBytes(SALT_BYTES), COST.logN, COST.r, COST.p);
    return false;
  }
  const expected = Buffer.from(key, 'base64');
  const given = await derive(password, Buffer.from(salt, 'base64'), Number(logN), Number(r), Number(p));
  return expected.length === given.length && timingSafeEqual(expected, given);
}
