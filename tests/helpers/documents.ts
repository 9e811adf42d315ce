import { parseStudy, type Study } from '@/engine';

/** A whole study document, as small as one can be. */
export const smallStudy = (title = 'Weir'): Study =>
  parseStudy({
    title,
    metre: '4/4',
    tempo: { beat: '1/4', perMinute: '60' },
    instruments: [{ id: 'pots', name: 'Flower pots', family: 'found' }],
    sections: [{ id: 'a', name: 'A', role: 'other', kind: 'free', lines: [{ instrument: 'pots', rhythm: '1/4 (1/4) 1/2' }] }],
  });
