import type { Metre } from '../rhythm/metre';
import type { MirrorSection, Section, Study } from '../study/schema';

function inherited<K extends 'metre' | 'tempo' | 'writing'>(study: Study, section: Section, field: K): NonNullable<Section[K]> | undefined {
  const seen = new Set<string>();
  let one: Section | undefined = section;
  while (one !== undefined && one[field] === undefined && one.kind === 'mirror' && !seen.has(one.id)) {
    seen.add(one.id);
    const { of }: MirrorSection = one;
    one = study.sections.find(({ id }) => id === of);
  }
  return one?.[field] as NonNullable<Section[K]> | undefined;
}

/** The metre of a section: its own, or that of what it mirrors, or the study's. */
export const metreOf = (study: Study, section: Section): Metre => inherited(study, section, 'metre') ?? study.metre;

/** The tempo of a section: its own, or that of what it mirrors, or the study's. */
export const tempoOf = (study: Study, section: Section): Study['tempo'] => inherited(study, section, 'tempo') ?? study.tempo;

/** How a stretch is written in a section: as it says itself, or as what it mirrors does, or in longer values. */
export const writingOf = (study: Study, section: Section): 'values' | 'tempo' | 'metre' => inherited(study, section, 'writing') ?? 'values';
