import { getDatabase } from '@/db/client';
import { getAccount, updateAccount } from '@/db/queries/users';
import { AppError } from '@/lib/errors';
import { accountResponse, updateAccountBody } from '@/lib/schemas/account';
import { jsonResponse } from '@/lib/server/json-response';
import { withUser } from '@/lib/server/with-access';

const signedOut = () => new AppError('unauthorized', 'Sign in first.');

// GET /api/account: the reader's own account
export const GET = withUser('GET /api/account', async ({ user }) => {
  const account = await getAccount(getDatabase(), user.id);
  if (!account) throw signedOut();
  return jsonResponse(accountResponse, { account });
});

// PATCH /api/account: changes the reader's own name, names of values, paper
export const PATCH = withUser('PATCH /api/account', async ({ user, body }) => {
  const account = await updateAccount(getDatabase(), user.id, updateAccountBody.parse(body));
  if (!account) throw signedOut();
  return jsonResponse(accountResponse, { account });
});
