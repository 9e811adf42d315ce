import type pg from 'pg';
import { expect } from 'vitest';
import type { Study } from '@/engine';
import type { ConflictWire, StudyWire, VersionListWire } from '@/lib/schemas/studies';
import type { Answer, Reader } from './api';

type Refusal = { error: { code: string; message: string; fields?: Record<string, string> } };

/** The study in a successful answer. */
export function studyOf({ status, body }: Answer, wanted: 200 | 201 = 200): StudyWire['study'] {
  expect([status, body]).toMatchObject([wanted, { study: {} }]);
  return (body as StudyWire).study;
}

/** The status and code of a refusal, and what it says of fields. */
export function refusalOf({ status, body }: Answer): [number, string, Record<string, string>?] {
  const { error } = body as Refusal;
  return error.fields ? [status, error.code, error.fields] : [status, error.code];
}

/** What a conflict says was saved meanwhile. */
export const currentOf = ({ body }: Answer): ConflictWire['current'] => (body as ConflictWire).current;

export const create = (reader: Reader, document: unknown, saveId: string = crypto.randomUUID()): Promise<Answer> =>
  reader.send('POST', '/api/studies', { document, saveId });

export const save = (reader: Reader, id: string, document: unknown, baseVersion: number, saveId: string = crypto.randomUUID()): Promise<Answer> =>
  reader.send('PUT', `/api/studies/${id}`, { document, baseVersion, saveId });

/** The kept versions as the API lists them on its first page: number and title. */
export async function versionsOf(reader: Reader, id: string): Promise<[number, string][]> {
  const { body } = await reader.ask(`/api/studies/${id}/versions`);
  return (body as VersionListWire).versions.map(({ version, title }) => [version, title]);
}

/** The documents of every kept version in order, as they stand in the database, and the study’s own. */
export async function keptOf(pool: pg.Pool, id: string): Promise<{ version: number; document: Study; versions: [number, Study][] }> {
  const { rows } = await pool.query<{ version: number; document: Study }>('select version, document from studies where id = $1', [id]);
  const kept = await pool.query<{ version: number; document: Study }>('select version, document from study_versions where study_id = $1 order by version', [id]);
  return { ...rows[0]!, versions: kept.rows.map(({ version, document }) => [version, document]) };
}
