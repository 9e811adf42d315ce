import { getDatabase } from '@/db/client';
import { updatePerson } from '@/db/queries/people';
import { AppError } from '@/lib/errors';
import { personParams, personResponse, updatePersonBody } from '@/lib/schemas/people';
import { jsonResponse } from '@/lib/server/json-response';
import { withUser } from '@/lib/server/with-access';

// PATCH /api/people/[id]: another's role, or whether their account is open; for administrators, never of oneself
export const PATCH = withUser('PATCH /api/people/[id]', async ({ user, params, body }) => {
  const { id } = personParams.parse(params);
  const changes = updatePersonBody.parse(body);
  if (id.toLowerCase() === user.id) throw new AppError('forbidden', 'Nobody changes their own role or closes their own account: ask another administrator.');
  const result = await updatePerson(getDatabase(), { id, by: user.id, ...changes });
  switch (result.kind) {
    case 'done':
      return jsonResponse(personResponse, { person: result.person });
    case 'missing':
      throw new AppError('not_found', 'There is no such person.');
    case 'last-administrator':
      throw new AppError('last_administrator', 'This is the last administrator: make another one first.');
    case 'not-allowed':
      throw new AppError('forbidden', 'This is for administrators only.');
  }
});
