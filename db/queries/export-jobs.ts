import { and, count, eq, getTableColumns, inArray, isNotNull, isNull, or, sql, type SQL } from 'drizzle-orm';
import type { Study } from '../../engine';
import type { Database } from '../connect';
import { UUID } from '../cursor';
import { exportJobs, studies, studyVersions, type ExportOptions } from '../schema';

/** Who asks: an account, a guest by the hash of a token, or neither, who sees what is of a demo study only. */
export type Asker = { readonly userId: string | null; readonly tokenHash: string | null };

const { id, state, done, total, errorCode, errorMessage, resultType, resultName, options, createdAt, endedAt } = getTableColumns(exportJobs);
/** Everything but what is made from and what is made. */
const SHOWN = { id, state, done, total, errorCode, errorMessage, resultType, resultName, options, createdAt, endedAt };

export type ExportJob = Awaited<ReturnType<typeof getExportJob>> & object;

const isAnybodys = and(isNull(exportJobs.ownerId), isNull(exportJobs.tokenHash));
function isOwn({ userId, tokenHash }: Asker): SQL {
  const ways = [userId === null ? undefined : eq(exportJobs.ownerId, userId), tokenHash === null ? undefined : eq(exportJobs.tokenHash, tokenHash)];
  return or(...ways) ?? sql`false`;
}
const isOpen = inArray(exportJobs.state, ['queued', 'running']);

/** One print that the asker may see, without its file; undefined where there is none. */
export async function getExportJob(database: Database, { id: wanted, ...asker }: Asker & { id: string }) {
  if (!UUID.test(wanted)) return undefined;
  const [row] = await database
    .select({ ...SHOWN, isShared: sql<boolean>`${isAnybodys}` })
    .from(exportJobs)
    .where(and(eq(exportJobs.id, wanted), or(isAnybodys, isOwn(asker))));
  return row;
}

/** The file of a print that is made, for whoever may see the print; undefined where there is none. */
export async function getExportFile(database: Database, { id: wanted, ...asker }: Asker & { id: string }) {
  if (!UUID.test(wanted)) return undefined;
  const [row] = await database
    .select({ key: exportJobs.key, result: exportJobs.result, resultType, resultName, isShared: sql<boolean>`${isAnybodys}` })
    .from(exportJobs)
    .where(and(eq(exportJobs.id, wanted), isNotNull(exportJobs.result), or(isAnybodys, isOwn(asker))));
  return row;
}

type Source = { readonly studyId: string; readonly version: number } | { readonly document: Study };
export type Asked = { readonly for: Asker; readonly key: string; readonly options: ExportOptions; readonly source: Source };
/** Prints that may wait at once: of one asker, and of all. */
export type WaitingLimits = { readonly own: number; readonly all: number };

/**
 * Asks for a print. The same asked for again by the same reader, waiting, being made or made, is the same print.
 * @param asked.for - with neither account nor token the print is anybody's: only for demo studies
 * @returns `full` where too many wait already
 */
export async function askForExport(
  database: Database,
  { for: asker, key, options: wanted, source }: Asked,
  limits: WaitingLimits,
): Promise<{ readonly kind: 'job'; readonly id: string; readonly isNew: boolean } | { readonly kind: 'full'; readonly whose: 'own' | 'all' }> {
  const { userId, tokenHash } = asker;
  const isMine = userId === null && tokenHash === null ? isAnybodys : isOwn(asker);
  return database.transaction(async (tx) => {
    // The same asker asks one thing at a time, so that two requests at once make one print.
    await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`export ${userId ?? tokenHash ?? ''}`}, 0))`);
    const [same] = await tx
      .select({ id })
      .from(exportJobs)
      .where(and(eq(exportJobs.key, key), isMine, inArray(exportJobs.state, ['queued', 'running', 'done'])))
      .limit(1);
    if (same) return { kind: 'job', id: same.id, isNew: false };
    const [waiting] = await tx.select({ all: count(), own: sql<number>`count(*) filter (where ${isMine})::int` }).from(exportJobs).where(isOpen);
    if (waiting && waiting.all >= limits.all) return { kind: 'full', whose: 'all' };
    if (waiting && waiting.own >= limits.own) return { kind: 'full', whose: 'own' };
    const [made] = await tx.insert(exportJobs).values({ ownerId: userId, tokenHash, key, options: wanted, ...source }).returning({ id });
    return { kind: 'job', id: made!.id, isNew: true };
  });
}

/** Gives up a print that waits or is being made; whoever makes it learns of it at the next renewal. @returns whether there was one */
export async function cancelExport(database: Database, { id: wanted, ...asker }: Asker & { id: string }): Promise<boolean> {
  if (!UUID.test(wanted)) return false;
  const rows = await database
    .update(exportJobs)
    .set({ state: 'cancelled', document: null, worker: null, leaseUntil: null, endedAt: sql`now()` })
    .where(and(eq(exportJobs.id, wanted), isOwn(asker), isOpen))
    .returning({ id });
  return rows.length > 0;
}

/** How long a worker has a print before it must say that it is still there, and how often one is begun. */
export const LEASE_SECONDS = 10;
export const ATTEMPTS = 3;
const leaseEnd = sql`now() + make_interval(secs => ${LEASE_SECONDS})`;
const isLost = and(eq(exportJobs.state, 'running'), sql`${exportJobs.leaseUntil} < now()`);

/** How many the same asker asked for shortly before: everybody's first goes before anybody's second. */
const placeOfAsker = sql`(
  select count(*) from ${exportJobs} before
  where before.created_at < ${exportJobs.createdAt} and before.created_at > ${exportJobs.createdAt} - interval '10 minutes'
    and coalesce(before.owner_id::text, before.token_hash, '') = coalesce(${exportJobs.ownerId}::text, ${exportJobs.tokenHash}, '')
)`;

/**
 * Takes the print that has waited longest, askers in turn, or one whose worker has gone. Undefined where nothing waits.
 * @returns the print with the study that it is made from; `study` is undefined where that version is gone
 */
export async function takeExport(database: Database, worker: string) {
  const next = database
    .select({ id })
    .from(exportJobs)
    .where(and(or(eq(exportJobs.state, 'queued'), isLost), sql`${exportJobs.attempts} < ${ATTEMPTS}`))
    .orderBy(placeOfAsker, exportJobs.createdAt)
    .limit(1)
    .for('update', { skipLocked: true });
  const [job] = await database
    .update(exportJobs)
    .set({ state: 'running', worker, leaseUntil: leaseEnd, attempts: sql`${exportJobs.attempts} + 1`, done: 0 })
    .where(inArray(exportJobs.id, next))
    .returning({ id, options, document: exportJobs.document, studyId: exportJobs.studyId, version: exportJobs.version, createdAt });
  if (!job) return undefined;
  if (job.document !== null) return { id: job.id, options: job.options, study: job.document, version: null, madeAt: job.createdAt };
  const [kept] = await database
    .select({ document: studyVersions.document, createdAt: studyVersions.createdAt })
    .from(studyVersions)
    .innerJoin(studies, eq(studies.id, studyVersions.studyId))
    .where(and(eq(studyVersions.studyId, job.studyId ?? ''), eq(studyVersions.version, job.version ?? 0), isNull(studies.deletedAt)));
  return { id: job.id, options: job.options, study: kept?.document, version: job.version, madeAt: kept?.createdAt ?? job.createdAt };
}

const held = (by: { id: string; worker: string }) => and(eq(exportJobs.id, by.id), eq(exportJobs.worker, by.worker), eq(exportJobs.state, 'running'));
type Held = { readonly id: string; readonly worker: string };

/** Says that the worker is still there, and how far it is. @returns false where the print is no longer its own: given up, or taken by another */
export async function renewExport(database: Database, { done: made, total: all, ...by }: Held & { done: number; total: number | null }): Promise<boolean> {
  const rows = await database.update(exportJobs).set({ leaseUntil: leaseEnd, done: made, total: all }).where(held(by)).returning({ id });
  return rows.length > 0;
}

/** Keeps the file of a print. @returns false where the print is no longer this worker's */
export async function finishExport(database: Database, { file, pages, ...by }: Held & { file: { bytes: Uint8Array; type: string; name: string }; pages: number }): Promise<boolean> {
  const rows = await database
    .update(exportJobs)
    .set({ state: 'done', result: file.bytes, resultType: file.type, resultName: file.name, done: pages, total: pages, document: null, worker: null, leaseUntil: null, endedAt: sql`now()` })
    .where(held(by))
    .returning({ id });
  return rows.length > 0;
}

/** Ends a print that cannot be made, with the sentence that says why. */
export async function failExport(database: Database, { code, message, ...by }: Held & { code: string; message: string }): Promise<void> {
  await database
    .update(exportJobs)
    .set({ state: 'failed', errorCode: code, errorMessage: message, document: null, worker: null, leaseUntil: null, endedAt: sql`now()` })
    .where(held(by));
}

/** Ends what was begun too often, and deletes what ended, or began to wait, more than a day ago. */
export async function sweepExports(database: Database): Promise<void> {
  const message = 'This could not be made: it was begun three times, and each time the server ended before it. Try again, or print fewer pages at a time.';
  await database
    .update(exportJobs)
    .set({ state: 'failed', errorCode: 'export_lost', errorMessage: message, document: null, worker: null, leaseUntil: null, endedAt: sql`now()` })
    .where(and(isLost, sql`${exportJobs.attempts} >= ${ATTEMPTS}`));
  await database.delete(exportJobs).where(sql`coalesce(${exportJobs.endedAt}, ${exportJobs.createdAt}) < now() - interval '1 day' and ${exportJobs.state} <> 'running'`);
}
