import 'server-only';
import { getDatabase } from '@/db/client';
import { getExportFile } from '@/db/queries/export-jobs';
import type { WholeStudy } from '@/db/queries/save-study';
import { getStudy } from '@/db/queries/studies';
import type { ExportOptions } from '@/db/schema';
import { buildStudy, parseStudy, type Study } from '@/engine';
import { AppError } from '../../errors';
import { fileName } from '../../file-names';
import { musicFile, type MusicKind } from '../../music-files';
import { exportResponse, noQuery, pageQuery } from '../../schemas/exports';
import { studyParams } from '../../schemas/studies';
import type { CurrentUser } from '../current-user';
import { jsonResponse } from '../json-response';
import { noStudy } from '../study-answers';
import type { PublicArgs } from '../with-access';
import { exportItemOf, orderExport, waitForExport } from './answers';
import { fileResponse } from './file-response';
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

type Made = { readonly options: ExportOptions; readonly key: string };

/** Has a file made apart and waits for it; where that takes longer than a few seconds, 202 and the address to wait at. */
async function madeApart({ id, version, isDemo }: WholeStudy, user: CurrentUser | null, { options, key }: Made): Promise<Uint8Array | Response> {
  const asker = { userId: isDemo ? null : (user?.id ?? null), tokenHash: null };
  const job = await waitForExport(asker, await orderExport({ for: asker, key, options, source: { studyId: id, version } }), PRINT_LIMITS.waitSeconds);
  if (job.state === 'failed') throw new AppError('invalid', job.errorMessage ?? 'This could not be made.');
  const file = job.state === 'done' ? await getExportFile(getDatabase(), { ...asker, id: job.id }) : undefined;
  if (file?.result) return file.result;
  return jsonResponse(exportResponse, { export: exportItemOf(job) }, { status: 202, headers: { location: `/api/exports/${job.id}`, 'retry-after': '2' } });
}

/** Values of all lines from which on writing them keeps others waiting too long: then it is done apart. A setting of ours. */
const MANY_VALUES = 12_000;
const hasManyValues = (study: Study): boolean => buildStudy(study).lines.reduce((sum, { rhythm }) => sum + rhythm.length, 0) > MANY_VALUES;

/**
 * The answer with a file that the engine writes, of a study that the reader may see.
 * @param player - id of the player whose part it is
 * @throws EngineError where the study cannot be written so, with the reason
 */
export async function studyFile({ req, params, query, user }: PublicArgs, kind: MusicKind | 'json', player?: string): Promise<Response> {
  noQuery.parse(query);
  const study = await readableStudy(params, user);
  const { id, version, document, isDemo } = study;
  const name = fileName([document.title, player === undefined ? '' : playerOf(document, player).name], kind);
  const key = keyOf(id, version, kind, player);
  return fileResponse(req, { kind, name, key, isPublic: isDemo }, () => {
    // The database keeps no order of keys; the schema has one.
    if (kind === 'json') return `${JSON.stringify(parseStudy(document), null, 2)}\n`;
    if (!hasManyValues(document)) return musicFile(document, kind, player);
    return madeApart(study, user, { options: { what: player === undefined ? 'score' : 'part', as: kind, player }, key });
  });
}

/**
 * The answer with a print of a study that the reader may see, which is made apart.
 * @throws AppError where the study cannot be printed, with the reason
 */
export async function studyPrint({ req, params, query, user }: PublicArgs, what: ExportOptions['what'], player?: string): Promise<Response> {
  const asked = pageQuery.parse(query);
  const study = await readableStudy(params, user);
  const { id, version, document, isDemo } = study;
  const kind = what === 'parts' ? 'zip' : 'pdf';
  const name = fileName([document.title, player === undefined ? (what === 'parts' ? 'parts' : '') : playerOf(document, player).name], kind);
  const options = exportOptions(what, asked, player);
  const key = keyOf(id, version, options);
  return fileResponse(req, { kind, name, key, isPublic: isDemo }, () => madeApart(study, user, { options, key }));
}
