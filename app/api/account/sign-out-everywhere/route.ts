import { getDatabase } from '@/db/client';
import { endSessions } from '@/db/queries/users';
import { doneResponse } from '@/lib/schemas/common';
import { jsonResponse } from '@/lib/server/json-response';
import { noSessionCookie } from '@/lib/server/session-cookie';
import { withUser } from '@/lib/server/with-access';

// POST /api/account/sign-out-everywhere: ends every session of the reader's account, this one too
export const POST = withUser('POST /api/account/sign-out-everywhere', async ({ user }) => {
  await endSessions(getDatabase(), user.id);
  return jsonResponse(doneResponse, { ok: true }, { headers: { 'set-cookie': noSessionCookie() } });
});
