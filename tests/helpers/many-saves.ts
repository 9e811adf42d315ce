import type pg from 'pg';
import { expect } from 'vitest';
import { parseStudy, type Study } from '@/engine';
import { lockGates } from '@/db/demo/lock-gates';
import type { Answer } from './api';
import { create, save, studyOf } from './own-study';
import type { Person } from './people';

type Sent = { readonly saveId: string; readonly document: Study };
/** A study and all its saves in order; the first makes it. */
type Work = { readonly saves: readonly Sent[]; id: string | undefined; acknowledged: number; isPending: boolean };

const PER_STUDY = 25;
const STUDIES = 2;

/** A whole study that says which save it is. */
const documentOf = (title: string): Study => parseStudy({ ...lockGates, title });

/** Many saves of several studies, one after another for each person, all persons at once. */
export class ManySaves {
  private readonly works: readonly { readonly person: Person; readonly works: readonly Work[] }[];
  /** what came back instead of an acknowledgement: a status, or 0 where the connection broke */
  readonly refused: number[] = [];

  constructor(people: readonly Person[]) {
    const workOf = (name: string): Work => ({
      saves: Array.from({ length: PER_STUDY }, (_, i) => ({ saveId: crypto.randomUUID(), document: documentOf(`${name}, save ${i + 1}`) })),
      id: undefined,
      acknowledged: 0,
      isPending: false,
    });
    this.works = people.map((person, p) => ({ person, works: Array.from({ length: STUDIES }, (_, i) => workOf(`Study ${p + 1}.${i + 1}`)) }));
  }

  private get all(): Work[] {
    return this.works.flatMap(({ works }) => works);
  }
  get acknowledged(): number {
    return this.all.reduce((sum, work) => sum + work.acknowledged, 0);
  }
  get pending(): number {
    return this.all.filter((work) => work.isPending).length;
  }

  /** Sends the next save of a study, or again the one that had no answer; whether it was acknowledged. */
  private async send({ reader }: Person, work: Work): Promise<boolean> {
    const at = work.acknowledged;
    const { saveId, document } = work.saves[at]!;
    work.isPending = true;
    let answer: Answer;
    try {
      answer = await (work.id === undefined ? create(reader, document, saveId) : save(reader, work.id, document, at, saveId));
    } catch {
      this.refused.push(0);
      return false;
    }
    if (answer.status >= 500) {
      this.refused.push(answer.status);
      return false;
    }
    const study = studyOf(answer, at === 0 ? 201 : 200);
    expect({ version: study.version, document: study.document }).toEqual({ version: at + 1, document });
    Object.assign(work, { id: study.id, acknowledged: at + 1, isPending: false });
    return true;
  }

  /** Each person saves, until a save has no answer or there are none left. @param afterEach - called after each acknowledgement */
  async run(afterEach: () => void): Promise<void> {
    await Promise.all(
      this.works.map(async ({ person, works }) => {
        for (;;) {
          const [next] = works.filter(({ acknowledged }) => acknowledged < PER_STUDY).sort((a, b) => a.acknowledged - b.acknowledged);
          if (!next || !(await this.send(person, next))) return;
          afterEach();
        }
      }),
    );
  }

  /** Sends again, under the same ids, what had no answer. */
  async resend(): Promise<void> {
    for (const { person, works } of this.works) for (const work of works) if (work.isPending) expect(await this.send(person, work)).toBe(true);
  }

  /** Sends again the last save of each study that was acknowledged, which must change nothing. */
  async repeat(): Promise<void> {
    for (const { person: { reader }, works } of this.works) {
      for (const { id, saves, acknowledged } of works) {
        if (id === undefined) continue;
        const { saveId, document } = saves[acknowledged - 1]!;
        const answer = await (acknowledged === 1 ? create(reader, document, saveId) : save(reader, id, document, acknowledged - 1, saveId));
        expect(studyOf(answer, acknowledged === 1 ? 201 : 200)).toMatchObject({ id, version: acknowledged, document });
      }
    }
  }

  /**
   * Compares every row of these people with what they sent: of each study a whole beginning of its saves, all that were
   * acknowledged, at most the one more that had no answer, and the last of them as the study itself.
   * @returns how many of those without an answer had been kept
   */
  async check(pool: pg.Pool): Promise<number> {
    let kept = 0;
    for (const { person, works } of this.works) {
      const { rows } = await pool.query<{ first: string | null; version: number; title: string; document: Study; versions: { version: number; saveId: string; document: Study }[] }>(ROWS, [person.id]);
      const begun = works.flatMap(({ saves, acknowledged, isPending }) => {
        const found = rows.find(({ first }) => first === saves[0]!.saveId)?.versions.length ?? 0;
        expect([acknowledged, acknowledged + Number(isPending)]).toContain(found);
        kept += found - acknowledged;
        const last = saves[found - 1];
        if (!last) return [];
        const versions = saves.slice(0, found).map((sent, i) => ({ version: i + 1, ...sent }));
        return [{ first: saves[0]!.saveId, version: found, title: last.document.title, document: last.document, versions }];
      });
      const byFirst = (list: { first: string | null }[]) => [...list].sort((a, b) => String(a.first).localeCompare(String(b.first)));
      expect(byFirst(rows)).toEqual(byFirst(begun));
    }
    return kept;
  }
}

const ROWS = `
  select s.version, s.title, s.document, kept.first, coalesce(kept.versions, '[]') as versions from studies s, lateral (
    select jsonb_agg(jsonb_build_object('version', v.version, 'saveId', v.save_id, 'document', v.document) order by v.version) as versions,
      (array_agg(v.save_id order by v.version))[1] as first
    from study_versions v where v.study_id = s.id
  ) as kept where s.owner_id = $1`;
