import 'server-only';
import { getDatabase } from '@/db/client';
import { askForExport, getExportJob, type Asked, type Asker, type ExportJob } from '@/db/queries/export-jobs';
import { AppError } from '../../errors';
import type { ExportItem } from '../../schemas/exports';
import { PRINT_LIMITS } from './print-limits';
import { wakeExportWorker } from './worker';

export const noExport = () => new AppError('not_found', 'There is no such print, or it is not yours to open: prints are kept for a day.');

/** A print as the API shows it. */
export const exportItemOf = ({ id, options, state, done, total, errorCode, errorMessage, resultName, resultType, createdAt }: ExportJob): ExportItem => ({
  id,
  what: options.what,
  state,
  done,
  total,
  error: errorCode === null ? null : { code: errorCode, message: errorMessage ?? '' },
  file: resultName === null || resultType === null ? null : { name: resultName, type: resultType },
  createdAt,
});

/**
 * Asks for a print, or finds the same one asked for before.
 * @throws AppError `too_many` where too many wait already
 */
export async function orderExport(asked: Asked): Promise<ExportJob> {
  const { waiting } = PRINT_LIMITS;
  const isShared = asked.for.userId === null && asked.for.tokenHash === null;
  const answer = await askForExport(getDatabase(), asked, { own: isShared ? waiting.shared : waiting.own, all: waiting.all });
  if (answer.kind === 'full') {
    const whose = answer.whose === 'own' ? 'of yours wait' : 'wait';
    throw new AppError('too_many', `Too many prints ${whose} to be made already. Wait until one is done, or cancel one.`);
  }
  if (answer.isNew) wakeExportWorker();
  const job = await getExportJob(getDatabase(), { ...asked.for, id: answer.id });
  if (!job) throw noExport();
  return job;
}

const isOver = ({ state }: ExportJob): boolean => state !== 'queued' && state !== 'running';

/** Waits for a print to end, so many seconds at most. @returns it as it then stands */
export async function waitForExport(asker: Asker, job: ExportJob, seconds: number): Promise<ExportJob> {
  const until = Date.now() + seconds * 1000;
  for (let now = job; ; ) {
    if (isOver(now) || Date.now() > until) return now;
    await new Promise((go) => setTimeout(go, 150));
    const next = await getExportJob(getDatabase(), { ...asker, id: job.id });
    if (!next) throw noExport();
    now = next;
  }
}
