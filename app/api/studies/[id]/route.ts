import { getDatabase } from '@/db/client';
import { getStudy } from '@/db/queries/studies';
import { AppError } from '@/lib/errors';
import { studyParams, studyResponse } from '@/lib/schemas/studies';
import { jsonResponse } from '@/lib/server/json-response';
import { withPublic } from '@/lib/server/with-public';

// GET /api/studies/[id]: a demo study, or one of the reader's own, by its id or readable name
export const GET = withPublic(async ({ params, user }) => {
  const { id } = studyParams.parse(params);
  const study = await getStudy(getDatabase(), { id, userId: user?.id ?? null });
  if (!study) throw new AppError('not_found', 'There is no such study, or it is not yours to open.');
  return jsonResponse(studyResponse, { study });
});
