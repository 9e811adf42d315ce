import { describe, expect, it } from 'vitest';
import { formatRhythm, parseRhythm } from '@/engine';
import { tidyRhythm } from '@/lib/client/typed-rhythm';

describe('rhythm text as people type and paste it', () => {
  it.each([
    ['½ ¼ (⅛)', '1/2 1/4 (1/8)'], ['1/4, 1/8, 1/8', '1/4 1/8 1/8'], ['1/4;1/8;1/8', '1/4 1/8 1/8'], ['1/4\t1/8\n1/8', '1/4 1/8 1/8'], ['0,25 0,5', '1/4 1/2'], ['1⁄4 1∕8', '1/4 1/8'],
    ['1 / 4 1 /8', '1/4 1/8'], ['\u00a01/4\u00a01/8', '1/4 1/8'], ['  1/4   1/8  ', '1/4 1/8'], ['¼+⅛ (½)', '3/8 (1/2)'], ['[¼, ⅛]x2', '1/4 1/8 1/4 1/8'],
  ])('%j is %s', (typed, read) => expect(formatRhythm(parseRhythm(tidyRhythm(typed)))).toBe(read));
  it('what is right stays as it is', () => {
    for (const text of ['3/8> 1/8 (1/4) | 1/2///@2', '1/4+|1/4', '[1/4 1/8]x3']) expect(tidyRhythm(text)).toBe(text);
  });
});
