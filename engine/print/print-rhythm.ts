import { ONE, ZERO, Fraction } from '../exact/fraction';
import { spellLine } from '../notation/spell-line';
import { type Metre, parseMetre } from '../rhythm/metre';
import type { Rhythm } from '../rhythm/types';
import { notesOf } from './cells';
import { remembered } from './remembered';
import type { PrintScore } from './types';

/**
 * One rhythm as a print of one staff.
 * @param options.sounds - how many sounds the instrument has; as many as the rhythm names where nothing is said
 * @throws EngineError where it cannot be spelled
 */
export function printRhythm(values: Rhythm, metre: Metre, { sounds }: { sounds?: number | undefined } = {}): PrintScore {
  const spelled = spellLine(values, metre);
  const length = parseMetre(metre).length;
  let attack = 0;
  const origins = values.map(({ rest }) => (rest ? null : attack++));
  const most = sounds ?? values.reduce((greatest, { sound }) => Math.max(greatest, sound ?? 1), 1);
  const isSilent = (index: number): boolean => spelled[index]!.symbols.every(({ rest }) => rest);
  return {
    title: '',
    composer: null,
    rights: null,
    players: [],
    part: null,
    measures: spelled.map((measure, index) => ({
      index,
      number: index + 1,
      start: new Fraction(index).mul(length),
      length,
      scale: ONE,
      metre: measure.metre,
      signature: index === 0 ? measure.metre : null,
      sections: [],
      letter: null,
      tempo: null,
      seconds: ZERO,
    })),
    printed: spelled.map((_, index) => index),
    staves: [
      {
        id: 'rhythm',
        instruments: [{ id: 'rhythm', name: '', family: 'found', sounds: most }],
        cell: remembered((index) => ({
          instrument: 'rhythm',
          silent: isSilent(index),
          notes: notesOf(spelled[index]!.symbols, values, (value) => ({ statement: origins[value] === null ? null : 'subject', origin: origins[value]! })),
        })),
        isSilent,
        dynamics: [],
        changes: [],
        cues: [],
      },
    ],
    groups: [],
    repeats: [],
    duration: ZERO,
    failures: [],
    refusals: [],
  };
}
