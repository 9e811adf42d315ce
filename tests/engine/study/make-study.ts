import { EngineError, type StudyInput, buildStudy } from '@/engine';

type SectionInput = StudyInput['sections'][number];
type ProcessInput = Extract<SectionInput, { kind: 'process' }>;
type Line = { instrument: string; rhythm: string };

export const INSTRUMENTS = ['bell', 'block', 'drum', 'pot'] as const;

/** A study of the given sections, in 4/4 at quarter = 60, with four instruments and one subject, `s`. */
export function study(sections: SectionInput[], rest: Partial<StudyInput> = {}): StudyInput {
  return {
    title: 'Weir',
    metre: '4/4',
    tempo: { beat: '1/4', perMinute: '60' },
    subjects: [{ id: 's', name: 'Subject', rhythm: '1/4 1/8 (1/8) 1/2' }],
    instruments: [
      { id: 'bell', name: 'Bell', family: 'metal' },
      { id: 'block', name: 'Block', family: 'wood' },
      { id: 'drum', name: 'Drum', family: 'skin' },
      { id: 'pot', name: 'Pot', family: 'found' },
    ],
    sections,
    ...rest,
  };
}

/** A section that states `s` in proportion. */
export function stating(process: Omit<Extract<ProcessInput['process'], { kind: 'proportion' }>, 'kind'>, rest: Partial<ProcessInput> = {}): ProcessInput {
  return {
    id: 'a', name: 'A', role: 'exposition', kind: 'process', subject: 's', instruments: [...INSTRUMENTS],
    ...rest,
    process: { kind: 'proportion', ...process },
  };
}

export const free = (id: string, lines: Line[], rest: Partial<Extract<SectionInput, { kind: 'free' }>> = {}): SectionInput => ({
  id, name: id.toUpperCase(), role: 'episode', kind: 'free', lines, ...rest,
});

export const mirror = (id: string, of: string, by?: 'values' | 'attacks'): SectionInput => ({
  id, name: id.toUpperCase(), role: 'recapitulation', kind: 'mirror', of, ...(by === undefined ? {} : { by }),
});

/** What building throws; fails where it throws nothing, or something else. */
export function buildError(document: unknown): EngineError {
  try {
    buildStudy(document as StudyInput);
  } catch (error) {
    if (error instanceof EngineError) return error;
    throw error;
  }
  throw new Error('the study was built, though it should have been refused');
}
