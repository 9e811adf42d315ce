import { getDatabase } from '@/db/client';
import { createStudy } from '@/db/queries/save-study';
import { getStudy } from '@/db/queries/studies';
import { LIMITS } from '@/engine';
import { copyStudyBody, studyParams } from '@/lib/schemas/studies';
import { noStudy, saveAnswer } from '@/lib/server/study-answers';
import { withUser } from '@/lib/server/with-access';

const SUFFIX = ' (copy)';
const copyTitle = (title: string): string => `${title.slice(0, LIMITS.name - SUFFIX.length).replace(/\p{Surrogate}$/u, '')}${SUFFIX}`;

// POST /api/studies/[id]/copy: a new study of the reader's own, from one of theirs or a demo
export const POST = withUser('POST /api/studies/[id]/copy', async ({ params, body, user }) => {
  const { id } = studyParams.parse(params);
  const { title, saveId } = copyStudyBody.parse(body);
  const study = await getStudy(getDatabase(), { id, userId: user.id });
  if (!study) throw noStudy();
  const document = { ...study.document, title: title ?? copyTitle(study.title) };
  return saveAnswer(await createStudy(getDatabase(), { userId: user.id, document, saveId }), 201);
});
