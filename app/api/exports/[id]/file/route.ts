import { getDatabase } from '@/db/client';
import { getExportFile, getExportJob } from '@/db/queries/export-jobs';
import { AppError } from '@/lib/errors';
import type { FileKind } from '@/lib/file-types';
import { exportParams } from '@/lib/schemas/exports';
import { noExport } from '@/lib/server/exports/answers';
import { askerOf } from '@/lib/server/exports/asker';
import { fileResponse } from '@/lib/server/exports/file-response';
import { withPublic } from '@/lib/server/with-access';

// GET /api/exports/[id]/file: a print, or another file, that is made
export const GET = withPublic('GET /api/exports/[id]/file', async ({ req, params, user }) => {
  const by = { id: exportParams.parse(params).id, ...askerOf(req, user) };
  const file = await getExportFile(getDatabase(), by);
  if (file?.result && file.resultName !== null) {
    const { result, resultName: name, key, isShared: isPublic } = file;
    return fileResponse(req, { kind: name.slice(name.lastIndexOf('.') + 1) as FileKind, name, key, isPublic }, () => result);
  }
  const job = await getExportJob(getDatabase(), by);
  if (!job) throw noExport();
  if (job.state === 'failed') throw new AppError('invalid', job.errorMessage ?? 'This could not be printed.');
  throw new AppError('not_found', job.state === 'cancelled' ? 'This print was cancelled.' : 'This print is not made yet.');
});
