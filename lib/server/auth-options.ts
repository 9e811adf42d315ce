import 'server-only';
import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { z } from 'zod';
import { getDatabase } from '@/db/client';
import { verifyPassword } from '@/db/password';
import { getCredentials, normaliseEmail } from '@/db/queries/users';
import { PASSWORD_LENGTH } from '../schemas/account';
import { addressOf } from './address';
import { getEnv } from './env';
import { logFault } from './log-fault';
import { SESSION_SECONDS } from './session-cookie';
import { SignInLimit } from './sign-in-limit';

/** 254 is the longest address that mail can be sent to (RFC 5321, 4.5.3.1.3, less the angle brackets). */
const credentials = z.object({ email: z.string().max(254).regex(/^[^\s\p{Cc}]+@[^\s\p{Cc}]+$/u), password: z.string().min(1).max(PASSWORD_LENGTH.max) });
const limit = new SignInLimit();

class TooManyAttempts extends Error {}

/**
 * Signing in by address and password. The same answer, after the same time, for a wrong password and an unknown address.
 * @throws TooManyAttempts, which reaches the sign-in page as `?error=too_many_attempts`
 */
async function authorize(given: unknown, address: string) {
  const read = credentials.safeParse(given);
  if (!read.success) return null;
  const email = normaliseEmail(read.data.email);
  if (!limit.allow(address, email, Date.now())) throw new TooManyAttempts('too_many_attempts');
  const account = await getCredentials(getDatabase(), email);
  if (!(await verifyPassword(read.data.password, account?.passwordHash)) || !account) return null;
  limit.succeed(address, email);
  return { id: account.id, name: account.name, email: account.email, role: account.role, epoch: account.sessionEpoch };
}

/**
 * As `authorize`; but the sign-in library shows the message of whatever is thrown to the browser, so that only our own may pass.
 * @throws Error `too_many_attempts`, or `unavailable` for what has been logged
 */
async function authorizeSafely(given: unknown, address: string) {
  try {
    return await authorize(given, address);
  } catch (error) {
    if (error instanceof TooManyAttempts) throw error;
    logFault(error);
    throw new Error('unavailable');
  }
}

/**
 * The sign-in library's settings: sessions are sealed tokens that carry the account's id and its number of
 * sessions; what the browser sends to change its own session is not looked at.
 */
export const getAuthOptions = (): NextAuthOptions => ({
  secret: getEnv().NEXTAUTH_SECRET,
  session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
  pages: { signIn: '/sign-in', error: '/sign-in' },
  providers: [
    CredentialsProvider({
      credentials: { email: { label: 'E-mail', type: 'email' }, password: { label: 'Password', type: 'password' } },
      authorize: (given, req) => authorizeSafely(given, addressOf(req.headers?.['x-forwarded-for'])),
    }),
  ],
  callbacks: {
    jwt: ({ token, user }) => (user ? { ...token, id: user.id, role: user.role, epoch: user.epoch } : token),
    session: ({ session, token }) => ({ ...session, user: { ...session.user, id: token.id, role: token.role }, epoch: token.epoch }),
  },
});
