import type { StudyInput } from '../../engine';

/** A bridge with a limp: an additive metre, one drum set of four sounds, rotation, and attacks that run backwards. */
export const footbridge: StudyInput = {
  format: 1,
  title: 'Footbridge',
  metre: '2+2+3/8',
  tempo: { beat: '1/8', perMinute: '208' },
  subjects: [
    {
      id: 'steps',
      name: 'Steps',
      rhythm: '1/8>@1 1/8@3 1/4@2 1/8>@1 1/4@4 | 1/4@2 1/8>@3 1/8@3 3/8^@1 | 1/8@4 1/8@3 1/8@2 1/8@1 (1/8) 1/4>@2',
    },
  ],
  instruments: [
    { id: 'tom-toms', name: 'Tom-toms', family: 'skin', sound: 'tom-toms', sounds: 4 },
    { id: 'claves', name: 'Claves', family: 'wood', sound: 'claves' },
    { id: 'cowbell', name: 'Cowbell', family: 'metal', sound: 'cowbell', sounds: 1 },
    { id: 'pipes', name: 'Pipes', family: 'found', sound: 'pipes', sounds: 3 },
  ],
  players: [
    { id: 'p1', name: 'Player 1', instruments: ['tom-toms'] },
    { id: 'p2', name: 'Player 2', instruments: ['claves', 'cowbell', 'pipes'] },
  ],
  sections: [
    {
      id: 'walking',
      name: 'Walking',
      role: 'exposition',
      kind: 'process',
      subject: 'steps',
      process: {
        kind: 'proportion',
        factors: ['1', '1', '1', '2'],
        readings: ['forwards', 'backwards-attacks'],
        rotations: [0, 0, 4, 0],
        entries: 'successive',
      },
      instruments: ['tom-toms'],
      statementDynamics: ['mf', 'p < mf', 'mf', 'f > p'],
      dynamics: 'mp',
      under: [{ instrument: 'claves', rhythm: '[1/4 1/4 3/8]x15' }],
    },
    {
      id: 'planks-apart',
      dynamics: 'mp',
      name: 'Planks apart',
      role: 'episode',
      kind: 'free',
      metre: '5/8',
      lines: [
        { instrument: 'cowbell', rhythm: '[1/8> 1/8 1/8 1/8 1/8 3/8> 1/4]x4', dynamics: 'p < f', marks: [{ attack: 5, ends: 'choke' }, { attack: 12, ends: 'choke' }, { attack: 19, ends: 'choke' }, { attack: 26, ends: 'choke' }] },
        { instrument: 'pipes', rhythm: '[(3/8) 1/4@1 1/8@2 1/8@3 1/8@2 (1/4)]x4' },
      ],
    },
    {
      id: 'running',
      name: 'Running',
      role: 'development',
      kind: 'process',
      subject: 'steps',
      process: { kind: 'proportion', ratio: '2', count: 3, reading: 'forwards', entries: { every: '7/8' } },
      instruments: ['cowbell', 'pipes', 'tom-toms'],
      dynamics: 'f',
    },
    { id: 'home', name: 'Home', role: 'recapitulation', kind: 'mirror', of: 'walking', by: 'attacks', fermata: true },
  ],
};
