import { type Fraction, ZERO } from '../exact/fraction';
import type { ProcessSection, Section, Study } from '../study/schema';
import type { BuiltStudy, Statement } from '../study/types';

/** A level holds from a place on; a hairpin leads from one place to another, in whole notes that sound, from the study's start. */
export type Dynamic =
  | { readonly kind: 'level'; readonly at: Fraction; readonly text: string; readonly isMark: boolean }
  | { readonly kind: 'hairpin'; readonly from: Fraction; readonly to: Fraction; readonly direction: 'louder' | 'softer' };

const MARK = /^(?:p{1,5}|f{1,5}|mp|mf|sfp?|sfpp|sfz|sffz|fz|fp|rfz?|n)$/;

/** A plan of levels and hairpins: `p < f > mp`. Null where it is words. */
export function readDynamics(text: string): { levels: (string | null)[]; hairpins: ('louder' | 'softer')[] } | null {
  const tokens = text.trim().split(/\s*([<>])\s*|\s+/).filter((token) => token !== undefined && token !== '');
  const levels: (string | null)[] = [null];
  const hairpins: ('louder' | 'softer')[] = [];
  for (const token of tokens) {
    if (token === '<' || token === '>') {
      hairpins.push(token === '<' ? 'louder' : 'softer');
      levels.push(null);
    } else if (MARK.test(token) && levels.at(-1) === null) levels[levels.length - 1] = token;
    else return null;
  }
  return tokens.length === 0 ? null : { levels, hairpins };
}

/** Read from the end: what grew falls. Words stay as they are. */
export function reversedDynamics(text: string): string {
  const plan = readDynamics(text);
  if (plan === null) return text;
  const levels = plan.levels.toReversed();
  const signs = plan.hairpins.toReversed().map((direction) => (direction === 'louder' ? '>' : '<'));
  return levels.flatMap((level, index) => [level, signs[index]]).filter((part) => part !== null && part !== undefined).join(' ');
}

/** Lays a plan over a span: its levels at equal distances, hairpins between them. */
function layOut(text: string, start: Fraction, length: Fraction): Dynamic[] {
  const plan = readDynamics(text);
  if (plan === null) return text.trim() === '' ? [] : [{ kind: 'level', at: start, text: text.trim(), isMark: false }];
  const step = length.div(Math.max(plan.hairpins.length, 1));
  const at = (index: number): Fraction => start.add(step.mul(index));
  const found: Dynamic[] = [];
  plan.levels.forEach((level, index) => {
    if (level !== null) found.push({ kind: 'level', at: at(index), text: level, isMark: true });
    const direction = plan.hairpins[index];
    if (direction !== undefined) found.push({ kind: 'hairpin', from: at(index), to: at(index + 1), direction });
  });
  return found;
}

/** What a mirror mirrors in the end, and whether it is turned about. */
function sourceOf(study: Study, section: Section): { section: Section; isTurned: boolean } {
  let one = section;
  let isTurned = false;
  for (let steps = 0; one.kind === 'mirror' && steps <= study.sections.length; steps += 1) {
    const { of } = one;
    const next = study.sections.find(({ id }) => id === of);
    if (next === undefined) break;
    isTurned = !isTurned;
    one = next;
  }
  return { section: one, isTurned };
}

/** A section's own dynamics, or those of what it mirrors, turned about. The study has been built: no mirrors in a ring. */
export function sectionDynamics(study: Study, section: Section): string {
  if (section.dynamics !== undefined || section.kind !== 'mirror') return section.dynamics ?? '';
  const source = study.sections.find(({ id }) => id === section.of);
  return source === undefined ? '' : reversedDynamics(sectionDynamics(study, source));
}

const orOwn = (list: ProcessSection['statementDynamics'], index: number): string => (list === undefined || list.length === 0 ? '' : list[index % list.length]!);

/** The dynamics that a statement or a line has of its own, empty where it follows its section. */
function ownDynamics(study: Study, section: Section, statement: Statement, statements: readonly Statement[]): string {
  const under = section.under ?? [];
  const main = statements.length - under.length;
  if (section.kind === 'free') return section.lines[statement.index]?.dynamics ?? under[statement.index - section.lines.length]?.dynamics ?? '';
  if (section.kind === 'process') return statement.index < main ? orOwn(section.statementDynamics, statement.index) : (under[statement.index - main]?.dynamics ?? '');
  const { section: source, isTurned } = sourceOf(study, section);
  const turned = (text: string): string => (isTurned ? reversedDynamics(text) : text);
  if (statement.subject === null) {
    const lines = [...(source.kind === 'free' ? source.lines : []), ...(source.under ?? [])];
    return turned(lines.find(({ instrument }) => instrument === statement.instrument)?.dynamics ?? '');
  }
  const stated = statements.filter(({ subject }) => subject !== null);
  const index = stated.indexOf(statement);
  return turned(orOwn(source.kind === 'process' ? source.statementDynamics : undefined, isTurned ? stated.length - 1 - index : index));
}

/** Every statement's dynamics: its own over its own length, or its section's over the section's. */
export function dynamicsOf(study: Study, built: Pick<BuiltStudy, 'sections' | 'statements'>): Map<string, Dynamic[]> {
  const found = new Map<string, Dynamic[]>();
  study.sections.forEach((section, index) => {
    const { start, length } = built.sections[index] ?? { start: ZERO, length: ZERO };
    const statements = built.statements.filter((one) => one.section === section.id);
    const shared = layOut(sectionDynamics(study, section), start, length);
    for (const statement of statements) {
      const own = ownDynamics(study, section, statement, statements);
      found.set(statement.id, own === '' ? shared : layOut(own, statement.start, statement.length));
    }
  });
  return found;
}
