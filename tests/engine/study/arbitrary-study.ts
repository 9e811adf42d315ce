import fc from 'fast-check';
import { type StudyInput, formatFraction, formatRhythm } from '@/engine';
import { arbitraryFactor, arbitraryLength, arbitraryRhythm } from '../rhythm/arbitrary-rhythm';
import { INSTRUMENTS, free, mirror, stating, study } from './make-study';

const f = formatFraction;
type SectionInput = StudyInput['sections'][number];

const reading = fc.constantFrom('forwards' as const, 'backwards-values' as const, 'backwards-attacks' as const);
const entries = fc.oneof(
  fc.constantFrom('successive' as const, 'together' as const, 'ending-together' as const),
  arbitraryLength.map((every) => ({ every: f(every) })),
);
export const shortRhythm = arbitraryRhythm.map((r) => formatRhythm(r.slice(0, 8)));

/** Up to four statements, each on an instrument of its own, so that no two can overlap. */
export const stated = fc
  .record({
    factors: fc.array(arbitraryFactor.map(f), { minLength: 1, maxLength: 4 }),
    entries,
    readings: fc.array(reading, { minLength: 1, maxLength: 3 }),
    rotations: fc.array(fc.integer({ min: -5, max: 5 }), { minLength: 1, maxLength: 3 }),
  })
  .map((process) => stating(process));

export const played = fc.subarray([...INSTRUMENTS]).chain((who) =>
  fc.tuple(...who.map((instrument) => shortRhythm.map((rhythm) => ({ instrument, rhythm })))).map((lines) => free('x', lines)),
);

/** One to five sections, each a process, a free section, or the mirror of one that stands before it. */
const sections: fc.Arbitrary<SectionInput[]> = fc
  .array(
    fc.oneof(
      stated,
      played,
      fc.tuple(fc.nat(100), fc.constantFrom('values' as const, 'attacks' as const)).map(([of, by]) => ({ of, by })),
    ),
    { minLength: 1, maxLength: 5 },
  )
  .map((list) =>
    list.map((one, k): SectionInput => {
      if ('kind' in one) return { ...one, id: `s${k}`, name: `S${k}` };
      return k === 0 ? free('s0', []) : mirror(`s${k}`, `s${one.of % k}`, one.by);
    }),
  );

export const arbitraryStudy: fc.Arbitrary<StudyInput> = fc
  .tuple(shortRhythm, sections)
  .map(([rhythm, list]) => study(list, { subjects: [{ id: 's', name: 'Subject', rhythm }] }));
