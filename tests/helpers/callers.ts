import type { Database } from '@/db/connect';
import { deleteStudy } from '@/db/queries/own-studies';
import { createStudy, type WholeStudy } from '@/db/queries/save-study';
import { exportJobs } from '@/db/schema';
import type { Study } from '@/engine';
import { Reader } from './api';
import { smallStudy } from './documents';
import { newPerson, type Person } from './people';

/** In the order of every table of expectations. The owner and the stranger are composers; the stranger has a study too. */
export const CALLERS = ['nobody', 'student', 'teacher', 'composer', 'administrator', 'owner', 'stranger'] as const;
export type Caller = (typeof CALLERS)[number];
export type Statuses = readonly [nobody: number, student: number, teacher: number, composer: number, administrator: number, owner: number, stranger: number];

/** A study of somebody’s own, made without a request. */
export async function ownStudy(database: Database, userId: string, title = 'Towpath', players: Study['players'] = []): Promise<WholeStudy> {
  const made = await createStudy(database, { userId, document: { ...smallStudy(title), players } });
  if (made.kind !== 'saved') throw new Error(`A study was not made: ${made.kind}.`);
  return made.study;
}

export type Scene = {
  readonly owner: Person;
  /** the owner’s */
  readonly study: WholeStudy;
  /** the owner’s, thrown away */
  readonly gone: WholeStudy;
  /** prints that are made, by id: the owner’s, a guest’s, and one of a demo study that is anybody’s */
  readonly prints: { readonly own: string; readonly guest: string; readonly shared: string };
  readonly reader: Reader;
  /** whose account calls; undefined for nobody */
  readonly callerId: string | undefined;
};

/** A print that is made, without printing anything. */
export async function madePrint(database: Database, by: { ownerId?: string; tokenHash?: string }, name = 'Willow and eel.pdf'): Promise<string> {
  const options = { what: 'score', as: 'pdf', page: { paper: 'a4', orientation: 'portrait', staff: 5.5 } } as const;
  const file = { state: 'done', result: Buffer.from('%PDF'), resultType: 'application/pdf', resultName: name, endedAt: new Date() } as const;
  const [row] = await database.insert(exportJobs).values({ ...by, ...file, key: crypto.randomUUID(), options }).returning({ id: exportJobs.id });
  return row!.id;
}

/** A new owner with two studies, one of them thrown away, and somebody who calls. */
export async function newScene(database: Database, caller: Caller, passwordHash?: string): Promise<Scene> {
  const hash = passwordHash === undefined ? {} : { passwordHash };
  const owner = await newPerson(database, 'composer', hash);
  const study = await ownStudy(database, owner.id, 'Willow and eel', [{ id: 'one', name: 'Invented player', instruments: ['pots'] }]);
  const gone = await ownStudy(database, owner.id, 'Drained pond');
  await deleteStudy(database, { id: gone.id, userId: owner.id });
  const prints = {
    own: await madePrint(database, { ownerId: owner.id }),
    guest: await madePrint(database, { tokenHash: crypto.randomUUID() }),
    shared: await madePrint(database, {}, 'Lock Gates.pdf'),
  };
  if (caller === 'nobody') return { owner, study, gone, prints, reader: new Reader(), callerId: undefined };
  if (caller === 'owner') return { owner, study, gone, prints, reader: owner.reader, callerId: owner.id };
  const person = await newPerson(database, caller === 'stranger' ? 'composer' : caller, hash);
  if (caller === 'stranger') await ownStudy(database, person.id);
  return { owner, study, gone, prints, reader: person.reader, callerId: person.id };
}
