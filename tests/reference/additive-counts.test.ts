import { describe, expect, it } from 'vitest';
import { attacks, buildStudy } from '@/engine';

/** Notes of a line of n equal notes, built up and taken down. */
function notes(n: number, direction: 'growing' | 'shrinking', from: 'front' | 'back', repeatsEach = 1): number {
  const built = buildStudy({
    title: 'Weir', metre: '4/4', tempo: { beat: '1/8', perMinute: '150' },
    subjects: [{ id: 's', name: 'Subject', rhythm: `[1/8]x${n}` }],
    instruments: [{ id: 'i', name: 'Wood block', family: 'wood' }],
    sections: [
      {
        id: 'a', name: 'A', role: 'exposition', kind: 'process', subject: 's', instruments: ['i'],
        process: { kind: 'additive', direction, from, repeatsEach },
      },
    ],
  });
  return built.statements.reduce((sum, statement) => sum + attacks(statement.rhythm).length, 0);
}

/** Rzewski, Les Moutons de Panurge (1969), as described at musicgames.wikidot.com/sub:scratch-047; counts recomputed. */
describe('1, 1-2, 1-2-3 … n, the whole once more, then 2 … n, 3 … n, to n alone', () => {
  it.each([[1, 1, 2], [2, 3, 6], [8, 36, 72], [17, 153, 306], [65, 2145, 4290]])('%d notes: %d growing, n (n + 1) = %d in all', (n, growing, all) => {
    expect(notes(n, 'growing', 'front')).toBe(growing);
    // The whole once more is the first stage of shrinking, which keeps the end.
    expect(notes(n, 'growing', 'front') + notes(n, 'shrinking', 'back')).toBe(all);
  });

  it('each stage four times makes four times as many', () => {
    expect(notes(8, 'growing', 'front', 4)).toBe(144);
  });
});
