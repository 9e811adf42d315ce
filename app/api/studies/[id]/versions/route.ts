import { getDatabase } from '@/db/client';
import { listVersions } from '@/db/queries/study-versions';
import { PAGE_SIZE, studyParams, versionListParams, versionListResponse } from '@/lib/schemas/studies';
import { jsonResponse } from '@/lib/server/json-response';
import { badCursor, noStudy } from '@/lib/server/study-answers';
import { withUser } from '@/lib/server/with-access';

// GET /api/studies/[id]/versions: the kept versions, the newest first, without their documents
export const GET = withUser('GET /api/studies/[id]/versions', async ({ params, query, user }) => {
  const { id } = studyParams.parse(params);
  const { cursor } = versionListParams.parse(query);
  const page = await listVersions(getDatabase(), { id, userId: user.id, cursor, pageSize: PAGE_SIZE });
  if (page === undefined) throw badCursor();
  if (page === null) throw noStudy();
  return jsonResponse(versionListResponse, page);
});
