import { getDatabase } from '@/db/client';
import { getStudy } from '@/db/queries/studies';
import { AppError } from '@/lib/errors';
import { exportBody, exportResponse } from '@/lib/schemas/exports';
import { exportItemOf, orderExport } from '@/lib/server/exports/answers';
import { ownerOf } from '@/lib/server/exports/asker';
import { exportOptions } from '@/lib/server/exports/page-options';
import { keyOf } from '@/lib/server/exports/release';
import { playerOf } from '@/lib/server/exports/study-file';
import { jsonResponse } from '@/lib/server/json-response';
import { readDocument } from '@/lib/server/read-document';
import { noStudy } from '@/lib/server/study-answers';
import { withPublic } from '@/lib/server/with-access';

// POST /api/exports: asks for a print of a document, or of a saved study; the same again, while it is kept, is the same print
export const POST = withPublic('POST /api/exports', async ({ req, body, user }) => {
  const { what, player, document, study: id, version, ...page } = exportBody.parse(body);
  const saved = id === undefined ? undefined : await getStudy(getDatabase(), { id, userId: user?.id ?? null });
  if (id !== undefined && !saved) throw noStudy();
  if (saved && version !== undefined && version !== saved.version) throw new AppError('version_conflict', `This study is at version ${saved.version} now. Open it again, or send the document.`);
  const study = saved?.document ?? readDocument(document);
  if (player !== undefined) playerOf(study, player);
  const options = exportOptions(what, page, player);
  const { asker, token } = ownerOf(req, user);
  const source = saved ? { studyId: saved.id, version: saved.version } : { document: study };
  const key = saved ? keyOf(saved.id, saved.version, options) : keyOf(study, options);
  const job = await orderExport({ for: asker, key, options, source });
  return jsonResponse(exportResponse, { export: exportItemOf(job), ...(token !== undefined && { token }) }, { status: 202, headers: { location: `/api/exports/${job.id}` } });
});
