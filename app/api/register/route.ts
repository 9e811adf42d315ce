import { getDatabase } from '@/db/client';
import { hashPassword } from '@/db/password';
import { createUserIfMissing } from '@/db/queries/users';
import { registerBody } from '@/lib/schemas/account';
import { doneResponse } from '@/lib/schemas/common';
import { jsonResponse } from '@/lib/server/json-response';
import { withPublic } from '@/lib/server/with-access';

// POST /api/register: makes an account; a known address changes nothing, takes as long, and gets the same answer
export const POST = withPublic('POST /api/register', async ({ body }) => {
  const { password, ...person } = registerBody.parse(body);
  await createUserIfMissing(getDatabase(), { ...person, passwordHash: await hashPassword(password) });
  return jsonResponse(doneResponse, { ok: true }, { status: 201 });
});
