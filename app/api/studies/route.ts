import { getDatabase } from '@/db/client';
import { listOwnStudies } from '@/db/queries/own-studies';
import { createStudy } from '@/db/queries/save-study';
import { listDemoStudies } from '@/db/queries/studies';
import { AppError } from '@/lib/errors';
import { createStudyBody, ownStudyListResponse, PAGE_SIZE, studyListParams, studyListResponse } from '@/lib/schemas/studies';
import { jsonResponse } from '@/lib/server/json-response';
import { readDocument } from '@/lib/server/read-document';
import { badCursor, saveAnswer } from '@/lib/server/study-answers';
import { withPublic, withUser } from '@/lib/server/with-access';

// GET /api/studies: the demo studies; with ?list=own a page of the reader's own. Never their documents
export const GET = withPublic('GET /api/studies', async ({ query, user }) => {
  const params = studyListParams.parse({ list: 'demo', ...query });
  if (params.list === 'demo') return jsonResponse(studyListResponse, { studies: await listDemoStudies(getDatabase()) });
  if (!user) throw new AppError('unauthorized', 'Sign in first.');
  const { q, sort, cursor, deleted } = params;
  const page = await listOwnStudies(getDatabase(), { userId: user.id, q, sort, cursor, isDeleted: deleted, pageSize: PAGE_SIZE });
  if (!page) throw badCursor();
  return jsonResponse(ownStudyListResponse, page);
});

// POST /api/studies: a new study of the reader's own
export const POST = withUser('POST /api/studies', async ({ body, user }) => {
  const { document, saveId } = createStudyBody.parse(body);
  return saveAnswer(await createStudy(getDatabase(), { userId: user.id, document: readDocument(document), saveId }), 201);
});
