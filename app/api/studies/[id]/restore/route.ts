import { getDatabase } from '@/db/client';
import { restoreStudy } from '@/db/queries/own-studies';
import { studyListItemResponse, studyParams } from '@/lib/schemas/studies';
import { jsonResponse } from '@/lib/server/json-response';
import { noStudy } from '@/lib/server/study-answers';
import { withUser } from '@/lib/server/with-access';

// POST /api/studies/[id]/restore: brings back one's own study within thirty days
export const POST = withUser('POST /api/studies/[id]/restore', async ({ params, user }) => {
  const { id } = studyParams.parse(params);
  const study = await restoreStudy(getDatabase(), { id, userId: user.id });
  if (!study) throw noStudy();
  return jsonResponse(studyListItemResponse, { study });
});
