import { EngineError } from '../errors';
import { ONE, ZERO, type Fraction, sum } from '../exact/fraction';
import { LIMITS } from '../limits';
import { rulesOf } from '../process/registry';
import type { Placed, TracedValue } from '../process/types';
import { parseRhythm } from '../rhythm/parse';
import { retrograde } from '../transform/retrograde';
import { applySteps } from '../transform/steps';
import { locate } from './locate';
import { marked } from './marks';
import type { FreeSection, MirrorSection, ProcessSection, Section, Study } from './schema';

/** What a section plays, before it is placed in the study. */
export type SectionContent = { readonly placed: readonly Placed[]; readonly length: Fraction };

const unknownInstrument = (id: string, where: { section: string; path: string }): EngineError =>
  new EngineError('unknown_instrument', `“${id}” plays here, but is not in the list of instruments. Add it to the list, or let another play.`, where);

/** Works out each section once, mirrors after what they mirror. */
export class SectionBuilder {
  private readonly done = new Map<string, SectionContent>();
  private readonly open: string[] = [];
  private readonly subjects = new Map<string, readonly TracedValue[]>();
  private readonly instruments: ReadonlySet<string>;
  private readonly byId: ReadonlyMap<string, { section: Section; index: number }>;
  private values = 0;

  constructor(private readonly study: Study) {
    this.instruments = new Set(study.instruments.map((instrument) => instrument.id));
    this.byId = new Map(study.sections.map((section, index) => [section.id, { section, index }]));
  }

  content(id: string): SectionContent {
    const done = this.done.get(id);
    if (done) return done;
    const { section, index } = this.byId.get(id)!;
    if (this.open.includes(id)) this.refuseRing(id);
    this.open.push(id);
    const path = `sections.${index}`;
    const content = locate({ section: id, path }, () => this.build(section, path));
    this.open.pop();
    this.done.set(id, content);
    return content;
  }

  private build(section: Section, path: string): SectionContent {
    const main =
      section.kind === 'process'
        ? this.process(section, path)
        : section.kind === 'mirror'
          ? this.mirror(section, path)
          : section.lines.map((line, n) => this.line(section.id, line, `${path}.lines.${n}`));
    const under = (section.under ?? []).map((line, n) => this.line(section.id, line, `${path}.under.${n}`));
    const placed = [...main, ...under];
    const length = placed.reduce((longest, { end }) => (end.compare(longest) > 0 ? end : longest), ZERO);
    return { placed, length };
  }

  /** Counts values before they are made, so that too many are never made. */
  private reserve(values: number): void {
    this.values += values;
    if (this.values > LIMITS.studyValues) {
      throw new EngineError('too_large', `A study may have ${LIMITS.studyValues} values in all. This one has more.`);
    }
  }

  private subject(id: string | undefined, where: { section: string; path: string }): readonly TracedValue[] {
    const index = this.study.subjects.findIndex((subject) => subject.id === id);
    const subject = this.study.subjects[index];
    if (id === undefined || subject === undefined) {
      throw new EngineError('unknown_subject', id === undefined ? 'This section states no subject. Choose one.' : `There is no subject “${id}”. Choose one of the list.`, where);
    }
    let traced = this.subjects.get(id);
    if (traced === undefined) {
      const rhythm = locate({ path: `subjects.${index}.rhythm` }, () => parseRhythm(subject.rhythm));
      let attack = 0;
      traced = marked(rhythm, subject.marks).map((value) => ({ ...value, origin: value.rest ? null : attack++ }));
      this.subjects.set(id, traced);
    }
    return traced;
  }

  private process(section: ProcessSection, path: string): Placed[] {
    const where = { section: section.id, path: `${path}.process` };
    const rules = rulesOf(section.process);
    const own = rules.ownInstruments?.(section.process);
    const instruments = own ?? section.instruments;
    if (instruments.length === 0) {
      throw new EngineError('unknown_instrument', 'Nobody plays this section. Choose at least one instrument.', { ...where, path: `${path}.instruments` });
    }
    const list = own === undefined ? `${path}.instruments` : where.path;
    [...instruments, ...section.instruments].forEach((id, n) => {
      if (!this.instruments.has(id)) throw unknownInstrument(id, { section: section.id, path: own === undefined ? `${list}.${n}` : list });
    });
    const subject = rules.takesSubject ? this.subject(section.subject, { section: section.id, path: `${path}.subject` }) : [];
    const prepared = section.before?.length ? locate({ path: `${path}.before` }, () => applySteps(subject, section.before!)) : subject;
    const context = {
      section,
      process: section.process,
      path: where.path,
      // A rotation by a pulse may leave the rest of a value, which is no attack any more.
      subject: prepared === subject ? subject : prepared.map((value) => (value.rest ? { ...value, origin: null } : value)),
      instruments,
    };
    this.reserve(rules.size(context));
    return rules.statements(context);
  }

  private line(section: string, line: FreeSection['lines'][number], path: string): Placed {
    if (!this.instruments.has(line.instrument)) throw unknownInstrument(line.instrument, { section, path: `${path}.instrument` });
    const rhythm = marked(locate({ path: `${path}.rhythm` }, () => parseRhythm(line.rhythm)), line.marks);
    this.reserve(rhythm.length);
    const length = sum(rhythm.map((v) => v.length));
    return {
      start: ZERO,
      end: length,
      length,
      instrument: line.instrument,
      subject: null,
      factor: ONE,
      reading: 'forwards',
      rotation: 0,
      mirrored: false,
      values: rhythm.map((value) => ({ ...value, origin: null })),
    };
  }

  /** A statement or line at [s, e] of a source that lasts L comes at [L − e, L − s]. */
  private mirror(section: MirrorSection, path: string): Placed[] {
    if (!this.byId.has(section.of)) {
      throw new EngineError('unknown_section', `There is no section “${section.of}” to mirror. Choose another.`, { section: section.id, path: `${path}.of` });
    }
    const source = this.content(section.of);
    const by = section.by ?? 'values';
    this.reserve(source.placed.reduce((n, { values }) => n + values.length, 0));
    return source.placed
      .map((placed) => {
        const assigned = placed.assigned === undefined ? {} : { assigned: [...placed.assigned].reverse() };
        return {
          ...placed,
          ...assigned,
          start: source.length.sub(placed.end),
          end: source.length.sub(placed.start),
          mirrored: !placed.mirrored,
          values: retrograde(placed.values, by),
        };
      })
      .reverse()
      .sort((a, b) => a.start.compare(b.start));
  }

  private refuseRing(id: string): never {
    const ring = [...this.open.slice(this.open.indexOf(id)), id].map((one) => `“${this.byId.get(one)!.section.name}”`);
    const text = ring.length === 2 ? `${ring[0]} mirrors itself` : `${ring.join(' mirrors ')}: these sections mirror one another in a ring`;
    throw new EngineError('mirror_ring', `${text}, so none of them can be played. Let one of them mirror another section.`, { section: id });
  }
}
