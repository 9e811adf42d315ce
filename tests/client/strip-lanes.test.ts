import { expect, it } from 'vitest';
import { stripLanes } from '@/lib/client/strip-lanes';

const part = (from: number, to: number) => ({ from, to, family: 'wood' as const });

it.each([
  ['one after another share a lane', [part(0, 0.5), part(0.5, 1)], [0, 0], 1],
  ['all at once have one each', [part(0, 1), part(0, 1), part(0.2, 1)], [0, 1, 2], 3],
  ['a lane that is free again is used', [part(0, 0.4), part(0.2, 1), part(0.4, 1)], [0, 1, 0], 2],
  ['the order of the list does not matter', [part(0.5, 1), part(0, 0.6)], [1, 0], 2],
  ['a section without parts has one empty lane', [], [], 1],
])('%s', (_, parts, lanes, count) => {
  expect(stripLanes(parts)).toEqual({ lanes, count });
});
