import { describe, expect, it } from 'vitest';
import { demoStudies } from '../../../db/demo';
import { type PrintScore, type StudyInput, buildStudy, parseStudy, printScore, restRuns, reversedDynamics, symbolLength, readDynamics } from '../../../engine';

const print = (input: StudyInput, part?: string): PrintScore => {
  const study = parseStudy(input);
  return printScore(study, buildStudy(study), part === undefined ? {} : { part });
};
const two: StudyInput = {
  title: 'Two',
  metre: '4/4',
  tempo: { beat: '1/4', perMinute: '60' },
  instruments: [
    { id: 'pots', name: 'Pots', family: 'found' },
    { id: 'drum', name: 'Drum', family: 'skin' },
    { id: 'bell', name: 'Bell', family: 'metal' },
  ],
  players: [
    { id: 'p', name: 'Player 1', instruments: ['pots', 'drum'] },
    { id: 'q', name: 'Player 2', instruments: ['bell'] },
  ],
  sections: [
    { id: 'a', name: 'A', role: 'other', kind: 'free', dynamics: 'p < f', lines: [{ instrument: 'pots', rhythm: '1 1 1 1' }] },
    { id: 'b', name: 'B', role: 'other', kind: 'free', lines: [{ instrument: 'bell', rhythm: '[1/2 1/2]x12', dynamics: 'mp' }] },
    { id: 'c', name: 'C', role: 'other', kind: 'free', fermata: true, lines: [{ instrument: 'drum', rhythm: '1 1', marks: [{ attack: 1, ends: 'choke' }] }] },
    { id: 'd', name: 'D', role: 'other', kind: 'mirror', of: 'a' },
  ],
};

describe('what is printed', () => {
  it('fills every measure of every staff of the demos, score and parts', () => {
    for (const { study } of demoStudies) {
      const players = parseStudy(study).players.map(({ id }) => id);
      for (const part of [undefined, ...players]) {
        const { measures, staves } = print(study, part);
        for (const staff of staves) {
          for (const { index, length, scale } of measures) {
            const { notes } = staff.cell(index);
            const sum = notes.reduce((total, { symbol }) => total.add(symbolLength(symbol)), length.mul(0));
            expect(sum.equals(length.div(scale)), `${study.title} ${staff.id} measure ${index}`).toBe(true);
          }
        }
      }
    }
  });

  it('puts instruments of one player that never sound together onto one staff, the change said in the rests before', () => {
    const { staves, part } = print(two, 'p');
    expect(part).toEqual({ id: 'p', name: 'Player 1' });
    expect(staves).toHaveLength(1);
    expect(staves[0]!.changes).toEqual([
      { instrument: 'drum', said: 4, entry: 16 },
      { instrument: 'pots', said: 18, entry: 18 },
    ]);
    expect([0, 3, 4, 15, 16, 17, 18].map((index) => staves[0]!.cell(index).instrument)).toEqual(['pots', 'pots', 'drum', 'drum', 'drum', 'drum', 'pots']);
  });

  it('gives an instrument a part of its own where it is asked for by name, and refuses what is neither', () => {
    const { staves, part } = print(two, 'bell');
    expect(part).toEqual({ id: 'bell', name: 'Bell' });
    expect(staves.map(({ instruments }) => instruments.map(({ id }) => id))).toEqual([['bell']]);
    expect(() => print(two, 'nobody')).toThrow(/no player and no instrument/);
  });

  it('cues the entry after a long rest with what sounds before it', () => {
    const [staff] = print(two, 'p').staves;
    expect(staff!.cues.map(({ first, length, instrument }) => ({ first, length, instrument }))).toEqual([{ first: 14, length: 2, instrument: 'bell' }]);
  });

  it('gathers rests of a part, ended by letters and cues', () => {
    // A and B begin at measures 0 and 4; C at 16; the cue stands in 14 and 15.
    const score = print(two, 'p');
    expect(restRuns(score).map(({ first, length }) => [score.printed[first], length])).toEqual([[4, 10]]);
    expect(score.measures.filter(({ letter }) => letter !== null).map(({ index, letter }) => [index, letter])).toEqual([[0, 'A'], [4, 'B'], [16, 'C'], [18, 'D']]);
  });

  it('says a plan of dynamics at the notes, and turns it about in a mirror', () => {
    const [pots] = print(two).staves;
    const words = pots!.dynamics.map((one) => (one.kind === 'level' ? `${one.text} ${one.place.measure}+${one.place.offset.toFraction()}` : `${one.direction} ${one.from.measure}-${one.to.measure}+${one.to.offset.toFraction()}`));
    expect(words).toEqual(['p 0+0', 'louder 0-3+1', 'f 3+1', 'f 18+0', 'softer 18-21+1', 'p 21+1']);
    expect(reversedDynamics('p < f > mp')).toBe('mp < f > p');
    expect(readDynamics('very soft')).toBeNull();
  });

  it('holds the end of a section that says so, on every staff, and stops an attack that is choked', () => {
    const { staves } = print(two);
    expect(staves.map((staff) => staff.cell(17).notes.at(-1)?.fermata)).toEqual([true, true, true]);
    expect(staves[1]!.cell(17).notes[0]!.ends).toBe('choke');
    expect(staves[1]!.cell(16).notes[0]!.ends).toBeUndefined();
  });

  it('never lets twenty-four measures pass without a letter', () => {
    const long: StudyInput = { ...two, sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines: [{ instrument: 'pots', rhythm: '[1]x100' }] }] };
    const at = print(long).measures.filter(({ letter }) => letter !== null).map(({ index }) => index);
    expect(at).toEqual([0, 24, 48, 72, 96]);
  });
});
