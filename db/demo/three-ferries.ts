import type { StudyInput } from '../../engine';

/** Three boats of unlike speed that reach the far bank together: a canon in 5 : 4 : 3, triplets, and a return by attacks. */
export const threeFerries: StudyInput = {
  format: 1,
  title: 'Three Ferries',
  metre: '4/4',
  tempo: { beat: '1/4', perMinute: '96' },
  subjects: [
    { id: 'crossing', name: 'Crossing', rhythm: '1/4> 1/8 1/8 3/8 1/8 | 1/4 1/4 (1/4) 1/4 | 1/8 1/8 1/4 1/8 3/8 | 1/2> (1/4) 1/4', marks: [{ attack: 13, ends: 'let-ring' }] },
    { id: 'wake', name: 'Wake', rhythm: '1/4> 1/12 1/12 1/12 1/8 1/8 1/20 1/20 1/20 1/20 1/20 | 1/6 1/6 1/6 1/4 (1/4)' },
  ],
  instruments: [
    { id: 'brake-drum', name: 'Brake drum', family: 'metal', sound: 'brake-drum' },
    { id: 'planks', name: 'Planks', family: 'wood', sound: 'planks' },
    { id: 'bottles', name: 'Bottles', family: 'found', sound: 'bottles' },
    { id: 'congas', name: 'Congas', family: 'skin', sound: 'congas', sounds: 2 },
  ],
  players: [
    { id: 'p1', name: 'Player 1', instruments: ['brake-drum', 'congas'] },
    { id: 'p2', name: 'Player 2', instruments: ['planks'] },
    { id: 'p3', name: 'Player 3', instruments: ['bottles'] },
  ],
  sections: [
    {
      id: 'out',
      name: 'Three out',
      role: 'exposition',
      kind: 'process',
      subject: 'crossing',
      process: { kind: 'proportion', factors: ['5/2', '2', '3/2'], reading: 'forwards', entries: 'ending-together' },
      instruments: ['brake-drum', 'planks', 'bottles'],
      dynamics: 'p < f',
    },
    {
      id: 'midstream',
      name: 'Midstream',
      role: 'episode',
      kind: 'process',
      subject: 'wake',
      process: { kind: 'proportion', factors: ['1', '2', '3'], readings: ['forwards', 'backwards-values'], entries: 'successive' },
      instruments: ['planks', 'bottles', 'brake-drum'],
      statementDynamics: ['mf', 'f > mp', 'mp < ff'],
      dynamics: 'mf',
      under: [{ instrument: 'congas', rhythm: '[1/8>@1 1/8@2 1/8@2 1/8>@1 1/8@2 1/8@1 1/4@2]x12' }],
    },
    {
      id: 'drift',
      name: 'Drift',
      role: 'development',
      kind: 'process',
      subject: 'crossing',
      process: { kind: 'proportion', factors: ['3/2', '3/4'], reading: 'forwards', entries: 'ending-together' },
      instruments: ['planks', 'bottles'],
      before: [{ kind: 'rotate', steps: 3, by: 'values' }],
      dynamics: 'pp',
    },
    { id: 'back', name: 'Three back', role: 'recapitulation', kind: 'mirror', of: 'out', by: 'attacks', fermata: true },
  ],
};
