import type { StudyInput } from '../../engine';

/** A canal lock filled and emptied again: four statements, each longer; an episode; a middle; and all of it undone. */
export const lockGates: StudyInput = {
  format: 1,
  title: 'Lock Gates',
  metre: '4/4',
  tempo: { beat: '1/4', perMinute: '84' },
  subjects: [{ id: 's', name: 'Subject', rhythm: '3/8> 1/8 1/4 (1/4) | 1/8 1/8 1/4 3/8 1/8 | 1/2> (1/4) 1/4 | 1/4 1/4 1/2' }],
  instruments: [
    { id: 'crotales', name: 'Crotales', family: 'metal', sound: 'crotales' },
    { id: 'temple-blocks', name: 'Temple blocks', family: 'wood', sound: 'temple-blocks' },
    { id: 'log-drum', name: 'Log drum', family: 'wood', sound: 'log-drum' },
    { id: 'tam-tam', name: 'Tam-tam', family: 'metal', sound: 'tam-tam' },
    { id: 'wood-block', name: 'Wood block', family: 'wood', sound: 'wood-block' },
    { id: 'flower-pots', name: 'Flower pots', family: 'found', sound: 'flower-pots', sounds: 4 },
    { id: 'frame-drum', name: 'Frame drum', family: 'skin', sound: 'frame-drum' },
    { id: 'bass-drum', name: 'Bass drum', family: 'skin', sound: 'bass-drum' },
  ],
  players: [
    { id: 'p1', name: 'Player 1', instruments: ['crotales', 'wood-block'] },
    { id: 'p2', name: 'Player 2', instruments: ['temple-blocks', 'flower-pots'] },
    { id: 'p3', name: 'Player 3', instruments: ['log-drum', 'frame-drum'] },
    { id: 'p4', name: 'Player 4', instruments: ['tam-tam', 'bass-drum'] },
  ],
  sections: [
    {
      id: 'filling',
      name: 'Filling',
      role: 'exposition',
      kind: 'process',
      subject: 's',
      process: { kind: 'proportion', factors: ['1', '5/4', '3/2', '2'], reading: 'forwards', entries: 'successive' },
      instruments: ['crotales', 'temple-blocks', 'log-drum', 'tam-tam'],
      statementDynamics: ['mp', 'mp < mf', 'mf', 'mf < f > p'],
      dynamics: 'mf',
    },
    {
      id: 'sluice',
      name: 'Sluice',
      role: 'episode',
      kind: 'free',
      lines: [
        {
          instrument: 'flower-pots',
          rhythm:
            '1/8>@1 1/8@2 1/16@3 1/16@3 1/8@2 (1/8) 1/8@4 1/4@3 | 1/8>@1 1/8@3 1/16@4 1/16@4 1/8@2 (1/4) 1/4@1 | 3/16>@2 3/16@3 1/8@4 1/8@1 1/8@2 1/4@3 | 1/8>@4 1/8@3 1/8@2 1/8@1 1/2///@1',
        },
        { instrument: 'bass-drum', rhythm: '1/4 (3/4) | 1/4 (3/4) | 1/4 (1/4) 1/4 (1/4) | 1/2 1/2///', marks: [{ attack: 0, ends: 'let-ring' }, { attack: 5, ends: 'choke' }] },
      ],
      dynamics: 'p < mf',
    },
    {
      id: 'pound',
      name: 'Pound',
      role: 'development',
      kind: 'process',
      subject: 's',
      process: { kind: 'proportion', factors: ['1', '5/4', '3/2', '2'], readings: ['backwards-values', 'forwards'], entries: 'successive' },
      instruments: ['wood-block', 'flower-pots', 'frame-drum', 'bass-drum'],
      dynamics: 'f',
    },
    { id: 'sluice-reversed', name: 'Sluice, reversed', role: 'episode', kind: 'mirror', of: 'sluice' },
    { id: 'emptying', name: 'Emptying', role: 'recapitulation', kind: 'mirror', of: 'filling', fermata: true },
  ],
};
