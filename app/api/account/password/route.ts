import { getDatabase } from '@/db/client';
import { hashPassword, verifyPassword } from '@/db/password';
import { endSessions, getPasswordHash } from '@/db/queries/users';
import { AppError } from '@/lib/errors';
import { ADDRESS_AS_PASSWORD, changePasswordBody, isAddress } from '@/lib/schemas/account';
import { doneResponse } from '@/lib/schemas/common';
import { jsonResponse } from '@/lib/server/json-response';
import { sessionCookie } from '@/lib/server/session-cookie';
import { withUser } from '@/lib/server/with-access';

const refuse = (field: string, message: string) => new AppError('invalid', message, { [field]: message });

// POST /api/account/password: a new password; every other session ends, this one goes on
export const POST = withUser('POST /api/account/password', async ({ user, body }) => {
  const { current, next } = changePasswordBody.parse(body);
  if (isAddress(next, user.email)) throw refuse('next', ADDRESS_AS_PASSWORD);
  if (!(await verifyPassword(current, await getPasswordHash(getDatabase(), user.id)))) throw refuse('current', 'This is not the present password.');
  const sessionEpoch = await endSessions(getDatabase(), user.id, await hashPassword(next));
  if (sessionEpoch === undefined) throw new AppError('unauthorized', 'Sign in first.');
  return jsonResponse(doneResponse, { ok: true }, { headers: { 'set-cookie': await sessionCookie({ ...user, sessionEpoch }) } });
});
