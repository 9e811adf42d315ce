import type { StudyInput } from '@/engine';

const tempo = { beat: '1/4', perMinute: '72' } as const;

/** Everything that can stand about a note, as dense as it comes. */
export const crowded: StudyInput = {
  title: 'Weir with everything about it, and a title that is far too long for one line of a page of the usual size',
  composer: 'Invented for the test',
  rights: '© the composer, for the test',
  metre: '4/4',
  tempo,
  subjects: [
    { id: 's', name: 'S', rhythm: '1/12> 1/12^ 1/12>/// | 1/20 1/20> 1/20 1/20 1/20^ | 1/8 1/32> 1/32 1/16 | 1/64 1/64 1/64 1/64 1/16 1/8 1/4^///', marks: [{ attack: 0, ends: 'let-ring' }, { attack: 4, ends: 'choke' }, { attack: 17, ends: 'choke' }] },
  ],
  instruments: [
    { id: 'a', name: 'Cymbal, suspended, small, with a very long name', family: 'metal' },
    { id: 'b', name: 'Blocks', family: 'wood', sounds: 12 },
    { id: 'c', name: 'Drums', family: 'skin', sounds: 4 },
    { id: 'd', name: 'Tam-tam', family: 'metal', sounds: 1 },
  ],
  players: [
    { id: 'p', name: 'Player 1', instruments: ['a', 'b'] },
    { id: 'q', name: 'Player 2', instruments: ['c', 'd'] },
  ],
  sections: [
    { id: 'x', name: 'A section with rather a long name', role: 'exposition', kind: 'process', subject: 's', process: { kind: 'proportion', factors: ['1', '3/2', '5/4', '2'], entries: 'successive' }, instruments: ['a', 'c', 'd', 'a'], statementDynamics: ['pp < ff', 'mf > p < f', 'sfz', 'very quietly indeed'] },
    { id: 'y', name: 'Short', role: 'episode', kind: 'free', metre: '2/8', tempo: { beat: '1/8', perMinute: '132' }, fermata: true, lines: [{ instrument: 'b', rhythm: '[1/64>@1 1/64@12 1/64^@6 1/64@7 1/64@8 1/64@9 1/64@10 1/64@11]x6 1/4^@12', dynamics: 'ppp < fff > n' }] },
    { id: 'z', name: 'Slower', role: 'development', kind: 'process', subject: 's', process: { kind: 'proportion', factors: ['4/3', '3/2'], entries: 'successive' }, instruments: ['c', 'd'], writing: 'tempo', dynamics: 'p < f > p' },
    { id: 'w', name: 'Long silence', role: 'episode', kind: 'free', metre: '4/4', lines: [{ instrument: 'd', rhythm: '[1/2 1/2]x20' }] },
    { id: 'v', name: 'Again and again', role: 'coda', kind: 'process', subject: 's', process: { kind: 'phase', pulse: '1/4', shift: 1, repeatsPerShift: 4, shifts: 2 }, instruments: ['a', 'c'] },
    { id: 'u', name: 'Undone', role: 'recapitulation', kind: 'mirror', of: 'x', fermata: true },
  ],
};

/** Thirty instruments and some hundred measures. */
export const large = (instruments: number, measures: number): StudyInput => ({
  title: 'Tide tables',
  metre: '4/4',
  tempo,
  instruments: Array.from({ length: instruments }, (_, n) => ({ id: `i${n}`, name: `Instrument ${n + 1}`, family: (['metal', 'wood', 'skin', 'found'] as const)[n % 4]! })),
  players: Array.from({ length: Math.ceil(instruments / 3) }, (_, n) => ({ id: `p${n}`, name: `Player ${n + 1}`, instruments: [0, 1, 2].map((k) => `i${n * 3 + k}`).filter((id) => Number(id.slice(1)) < instruments) })),
  sections: [{ id: 's', name: 'Tide', role: 'other', kind: 'free', lines: Array.from({ length: instruments }, (_, n) => ({ instrument: `i${n}`, rhythm: `[1/8> 1/8 1/4 1/12 1/12 1/12 1/4]x${measures}` })) }],
});
