import 'server-only';
import { getDatabase } from '@/db/client';
import { getExportFile } from '@/db/queries/export-jobs';
import type { WholeStudy } from '@/db/queries/save-study';
import { getStudy } from '@/db/queries/studies';
import type { ExportOptions } from '@/db/schema';
import type { Study } from '@/engine';
import { AppError } from '../../errors';
import { fileName } from '../../file-names';
import { exportResponse, noQuery, pageQuery } from '../../schemas/exports';
import { studyParams } from '../../schemas/studies';
import type { CurrentUser } from '../current-user';
import { jsonResponse } from '../json-response';
import { noStudy } from '../study-answers';
import type { PublicArgs } from '../with-access';
import { exportItemOf, orderExport, waitForExport } from './answers';
import { fileResponse, type FileKind } from './file-response';
import { exportOptions } from './page-options';
import { PRINT_LIMITS } from './print-limits';
import { keyOf } from './release';

/** @throws AppError `not_found` where there is none, or it is not the reader's */
async function readableStudy(params: PublicArgs['params'], user: CurrentUser | null): Promise<WholeStudy> {
  const { id } = studyParams.parse(params);
  const study = await getStudy(getDatabase(), { id, userId: user?.id ?? null });
  if (!study) throw noStudy();
  return study;
}

export function playerOf({ players }: Study, id: string): Study['players'][number] {
  const player = players.find((one) => one.id === id);
  if (!player) throw new AppError('not_found', 'There is no such player in this study.');
  return player;
}

/**
 * The answer with a file that is made at once from a study that the reader may see.
 * @param wanted.player - id of the player whose part it is
 * @param wanted.make - makes it; what it throws says why the study cannot be written so
 */
export async function studyFile(
  { req, params, query, user }: PublicArgs,
  { kind, player, make }: { readonly kind: Exclude<FileKind, 'pdf' | 'zip'>; readonly player?: string; readonly make: (study: Study) => Uint8Array | string },
): Promise<Response> {
  noQuery.parse(query);
  const { id, version, document, isDemo } = await readableStudy(params, user);
  const name = fileName([document.title, player === undefined ? '' : playerOf(document, player).name], kind);
  return fileResponse(req, { kind, name, key: keyOf(id, version, kind, player), isPublic: isDemo }, () => make(document));
}

/**
 * The answer with a print of a study that the reader may see. It is made apart; where that takes longer than a few seconds
 * the answer is 202, with the address where the print can be waited for.
 */
export async function studyPrint({ req, params, query, user }: PublicArgs, what: ExportOptions['what'], player?: string): Promise<Response> {
  const asked = pageQuery.parse(query);
  const { id, version, document, isDemo } = await readableStudy(params, user);
  const name = fileName([document.title, player === undefined ? (what === 'parts' ? 'parts' : '') : playerOf(document, player).name], what === 'parts' ? 'zip' : 'pdf');
  const options = exportOptions(what, asked, player);
  const key = keyOf(id, version, options);
  return fileResponse(req, { kind: what === 'parts' ? 'zip' : 'pdf', name, key, isPublic: isDemo }, async () => {
    const asker = { userId: isDemo ? null : (user?.id ?? null), tokenHash: null };
    const job = await waitForExport(asker, await orderExport({ for: asker, key, options, source: { studyId: id, version } }), PRINT_LIMITS.waitSeconds);
    if (job.state === 'failed') throw new AppError('invalid', job.errorMessage ?? 'This could not be printed.');
    const file = job.state === 'done' ? await getExportFile(getDatabase(), { ...asker, id: job.id }) : undefined;
    if (file?.result) return file.result;
    const headers = { location: `/api/exports/${job.id}`, 'retry-after': '2' };
    return jsonResponse(exportResponse, { export: exportItemOf(job) }, { status: 202, headers });
  });
}
