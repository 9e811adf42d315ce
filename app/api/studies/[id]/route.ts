import { getDatabase } from '@/db/client';
import { deleteStudy } from '@/db/queries/own-studies';
import { saveStudy } from '@/db/queries/save-study';
import { getStudy } from '@/db/queries/studies';
import { renameStudyBody, saveStudyBody, studyListItemResponse, studyParams, studyResponse } from '@/lib/schemas/studies';
import { jsonResponse } from '@/lib/server/json-response';
import { readDocument } from '@/lib/server/read-document';
import { noStudy, readOnly, saveAnswer } from '@/lib/server/study-answers';
import { withPublic, withUser } from '@/lib/server/with-access';

// GET /api/studies/[id]: a demo study, or one of the reader's own, by its id or readable name
export const GET = withPublic('GET /api/studies/[id]', async ({ params, user }) => {
  const { id } = studyParams.parse(params);
  const study = await getStudy(getDatabase(), { id, userId: user?.id ?? null });
  if (!study) throw noStudy();
  return jsonResponse(studyResponse, { study });
});

// PUT /api/studies/[id]: saves a document on top of the version that it started from
export const PUT = withUser('PUT /api/studies/[id]', async ({ params, body, user }) => {
  const { id } = studyParams.parse(params);
  const { document, baseVersion, saveId } = saveStudyBody.parse(body);
  return saveAnswer(await saveStudy(getDatabase(), { id, userId: user.id, document: readDocument(document), baseVersion, saveId }), 200);
});

// PATCH /api/studies/[id]: another title, which is a new version
export const PATCH = withUser('PATCH /api/studies/[id]', async ({ params, body, user }) => {
  const { id } = studyParams.parse(params);
  const { title, baseVersion, saveId } = renameStudyBody.parse(body);
  const study = await getStudy(getDatabase(), { id, userId: user.id });
  if (!study) throw noStudy();
  if (study.isDemo) throw readOnly();
  return saveAnswer(await saveStudy(getDatabase(), { id, userId: user.id, document: { ...study.document, title }, baseVersion, saveId }), 200);
});

// DELETE /api/studies/[id]: throws one's own study away; it can be restored for thirty days
export const DELETE = withUser('DELETE /api/studies/[id]', async ({ params, user }) => {
  const { id } = studyParams.parse(params);
  const study = await deleteStudy(getDatabase(), { id, userId: user.id });
  if (study) return jsonResponse(studyListItemResponse, { study });
  throw (await getStudy(getDatabase(), { id, userId: user.id }))?.isDemo ? readOnly() : noStudy();
});
