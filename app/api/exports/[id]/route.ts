import { getDatabase } from '@/db/client';
import { cancelExport, getExportJob } from '@/db/queries/export-jobs';
import { AppError } from '@/lib/errors';
import { exportParams, exportResponse } from '@/lib/schemas/exports';
import { exportItemOf, noExport } from '@/lib/server/exports/answers';
import { askerOf } from '@/lib/server/exports/asker';
import { abortExport } from '@/lib/server/exports/worker';
import { jsonResponse } from '@/lib/server/json-response';
import { withPublic } from '@/lib/server/with-access';

// GET /api/exports/[id]: how far a print is
export const GET = withPublic('GET /api/exports/[id]', async ({ req, params, user }) => {
  const { id } = exportParams.parse(params);
  const job = await getExportJob(getDatabase(), { id, ...askerOf(req, user) });
  if (!job) throw noExport();
  return jsonResponse(exportResponse, { export: exportItemOf(job) });
});

// DELETE /api/exports/[id]: gives a print up; one that has ended stays as it is
export const DELETE = withPublic('DELETE /api/exports/[id]', async ({ req, params, user }) => {
  const { id } = exportParams.parse(params);
  const asker = askerOf(req, user);
  if (await cancelExport(getDatabase(), { id, ...asker })) abortExport(id);
  const job = await getExportJob(getDatabase(), { id, ...asker });
  if (!job) throw noExport();
  if (job.isShared) throw new AppError('forbidden', 'This is a print of a demonstration, which others may be waiting for: it is not cancelled.');
  return jsonResponse(exportResponse, { export: exportItemOf(job) });
});
