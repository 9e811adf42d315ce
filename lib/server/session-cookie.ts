import 'server-only';
import { encode } from 'next-auth/jwt';
import type { CurrentUser } from './current-user';
import { getEnv } from './env';

/** How long a session lasts without a visit, in seconds. */
export const SESSION_SECONDS = 30 * 24 * 60 * 60;

const isSecure = (): boolean => getEnv().NEXTAUTH_URL.startsWith('https://');
const line = (value: string, seconds: number): string =>
  `${isSecure() ? '__Secure-' : ''}next-auth.session-token=${value}; Path=/; Max-Age=${seconds}; HttpOnly; SameSite=Lax${isSecure() ? '; Secure' : ''}`;

/** The sign-in library's cookie for an account, as the library itself sets it: a session that goes on under a new number. */
export async function sessionCookie({ id, name, email, role, sessionEpoch }: CurrentUser): Promise<string> {
  const token = { sub: id, name, email, id, role, epoch: sessionEpoch };
  return line(await encode({ token, secret: getEnv().NEXTAUTH_SECRET, maxAge: SESSION_SECONDS }), SESSION_SECONDS);
}

/** Takes the session away from this browser. */
export const noSessionCookie = (): string => line('', 0);
