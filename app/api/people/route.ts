import { getDatabase } from '@/db/client';
import { listPeople } from '@/db/queries/people';
import { peopleParams, peopleResponse } from '@/lib/schemas/people';
import { PAGE_SIZE } from '@/lib/schemas/studies';
import { jsonResponse } from '@/lib/server/json-response';
import { badCursor } from '@/lib/server/study-answers';
import { withUser } from '@/lib/server/with-access';

// GET /api/people: accounts in order of address, for administrators; nothing of anybody's work
export const GET = withUser('GET /api/people', async ({ query }) => {
  const { q, cursor } = peopleParams.parse(query);
  const page = await listPeople(getDatabase(), { q, cursor, pageSize: PAGE_SIZE });
  if (!page) throw badCursor();
  return jsonResponse(peopleResponse, page);
});
