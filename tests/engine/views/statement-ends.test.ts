import { expect, it } from 'vitest';
import { buildStudy, endWords, formatFraction, parseStudy, statementEnds } from '@/engine';
import { stating, study } from '../study/make-study';

it('where every statement ends within its measure: at a bar line it is the end of the measure before', () => {
  // The subject lasts one measure of 4/4.
  const document = parseStudy(study([stating({ factors: ['1', '5/4', '3/2', '1/4'] })]));
  const ends = statementEnds(document, buildStudy(document));
  expect(ends.map(({ measure, within }) => [measure.number, formatFraction(within)])).toEqual([[1, '1'], [3, '1/4'], [4, '3/4'], [4, '1']]);
  expect(ends.map(endWords)).toEqual(['ends with measure 1', 'ends 1/4 into measure 3', 'ends 3/4 into measure 4', 'ends with measure 4']);
});
