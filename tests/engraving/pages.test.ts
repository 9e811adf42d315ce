import { beforeAll, describe, expect, it } from 'vitest';
import { demoStudies } from '@/db/demo';
import { type PrintScore, type StudyInput, buildStudy, parseStudy, printScore } from '@/engine';
import { drawPage } from '@/lib/engraving/draw-page';
import { openNodeEngraver } from '@/lib/engraving/node-environment';
import type { VexFlow } from '@/lib/engraving/notes';
import type { PageOptions } from '@/lib/engraving/page-options';
import { layOutPages } from '@/lib/engraving/pages';
import { textWidth } from '@/lib/engraving/text';
import { TURN_SECONDS, silenceAbout } from '@/lib/engraving/turns';
import { type Box, measuresOn, overlaps, rowInk, words } from './geometry';
import { writtenStudies } from '../helpers/written-studies';
import { crowded, large } from './studies';

let vf: VexFlow;
let page: Document;
beforeAll(async () => {
  ({ vf, document: page } = await openNodeEngraver());
});

function engrave(input: StudyInput, part: string | undefined, options: PageOptions) {
  const study = parseStudy(input);
  const score = printScore(study, buildStudy(study), part === undefined ? {} : { part });
  const layout = layOutPages(vf, score, options);
  const pages = layout.pages.map((one) => ({ page: one, ...drawPage(vf, page.createElement('div'), score, layout, one, options) }));
  return { score, layout, pages };
}

const PORTRAIT: PageOptions = { paper: 'a4', orientation: 'portrait', staff: 5.5, stamp: 'version 1' };
const cases: [string, StudyInput, string | undefined, PageOptions][] = [...demoStudies.map(({ study }) => study), crowded].flatMap((study) =>
  [undefined, ...parseStudy(study).players.map(({ id }) => id)].flatMap((part) =>
    ([PORTRAIT, { paper: 'letter', orientation: 'landscape', staff: 7, stamp: 'version 12, 1 December 2026' }, { paper: 'a4', orientation: 'portrait', staff: 8, stamp: 'version 12, 1 December 2026' }] as PageOptions[]).map((options): [string, StudyInput, string | undefined, PageOptions] => [
      `${study.title.slice(0, 14)}, ${part ?? 'score'}, ${options.paper} ${options.staff}`, study, part, options,
    ]),
  ),
);

const said = (box: Box): string => `${box.what} ${[box.left, box.top, box.right, box.bottom].map(Math.round).join(' ')}`;

const random = writtenStudies(process.env.SESQUI_MANY ? 120 : 24, 6).flatMap((study, n): typeof cases =>
  [undefined, 'p'].map((part) => [`random ${n + 1}, ${part ?? 'score'}`, study, part, n % 2 === 0 ? PORTRAIT : { paper: 'letter', orientation: 'landscape', staff: 7, stamp: 'version 12' }]),
);

describe.each([...cases, ...random])('%s', (_, study, part, options) => {
  let made: ReturnType<typeof engrave>;
  beforeAll(() => {
    made = engrave(study, part, options);
  });

  it('prints every measure once, in order', () => {
    const { score, layout } = made;
    expect(measuresOn(score, layout.pages.flatMap(({ systems }) => systems.map(({ system }) => system)))).toEqual(score.printed);
  });

  it('keeps every system and word between the margins', () => {
    const { geometry } = made.layout;
    for (const { systems, svg, page: { systems: placed, number } } of made.pages) {
      for (const { right } of systems) expect(right).toBeLessThanOrEqual(geometry.right + 0.5);
      for (const { y, system } of placed) expect(y + system.rows.height, `page ${number}`).toBeLessThanOrEqual(geometry.bottom + 0.5);
      for (const box of words(svg, (text, size, isBold) => textWidth(vf, text, { size, ...(isBold ? { weight: 'bold' as const } : {}) }))) {
        expect(box.left, said(box)).toBeGreaterThanOrEqual(geometry.left - 1);
        expect(box.right, said(box)).toBeLessThanOrEqual(geometry.right + 1);
        expect(box.bottom, said(box)).toBeLessThanOrEqual(geometry.height - 4);
      }
    }
  });

  it('lets no row reach into the next, nor into what is said over the system', () => {
    for (const { systems, page: { systems: placed } } of made.pages) {
      systems.forEach((system, n) => {
        const { rows } = placed[n]!.system.rows;
        let floor = placed[n]!.y + placed[n]!.system.rows.letters;
        for (const { staff } of rows) {
          const ink = rowInk(system, staff);
          const highest = ink.reduce<Box | null>((best, box) => (best === null || box.top < best.top ? box : best), null);
          if (highest !== null) expect(highest.top, `${said(highest)} under ${floor}`).toBeGreaterThanOrEqual(floor - 1);
          floor = Math.max(floor, ...ink.map(({ bottom }) => bottom));
        }
      });
    }
  });

  it('lets no notes of a row touch, and none a word', () => {
    for (const { systems, svg } of made.pages) {
      const text = words(svg, (one, size, isBold) => textWidth(vf, one, { size, ...(isBold ? { weight: 'bold' as const } : {}) }));
      for (let a = 0; a < text.length; a += 1) for (let b = a + 1; b < text.length; b += 1) expect(overlaps(text[a]!, text[b]!), `${said(text[a]!)} and ${said(text[b]!)}`).toBe(false);
      for (const system of systems) {
        for (const staff of new Set(system.notes.map((one) => one.staff))) {
          const ink = rowInk(system, staff);
          const heads = ink.filter(({ what }) => /^(note|rest)/.test(what));
          for (let n = 1; n < heads.length; n += 1) expect(overlaps(heads[n - 1]!, heads[n]!, 1), `${said(heads[n - 1]!)} and ${said(heads[n]!)}`).toBe(false);
          for (const box of ink) for (const word of text) expect(overlaps(box, word), `${said(box)} and ${said(word)}`).toBe(false);
          const [accents, brackets] = [ink.filter(({ what }) => what === 'articulation'), ink.filter(({ what }) => what === 'tuplet')];
          for (const accent of accents) for (const bracket of brackets) expect(overlaps(accent, bracket), `${said(accent)} and ${said(bracket)}`).toBe(false);
        }
      }
    }
  });

  it('turns pages in rests, or says that it cannot', () => {
    const { pages } = made.layout;
    if (part === undefined) return;
    pages.forEach(({ number, hurries }, index) => {
      const next = pages[index + 1]?.systems[0];
      if (number % 2 === 0 || next === undefined) return;
      const silence = silenceAbout(made.score, next.system.columns[0]!.measure);
      expect(hurries).toBe(silence < TURN_SECONDS);
    });
  });
});

describe('a large score', () => {
  it('breaks thirty staves and a hundred measures onto pages, and says where a system does not fit', () => {
    const { layout, score } = engrave(large(30, 100), undefined, { paper: 'a4', orientation: 'portrait', staff: 4 });
    expect(measuresOn(score, layout.pages.flatMap(({ systems }) => systems.map(({ system }) => system)))).toHaveLength(100);
    expect(layout.remarks.length).toBeGreaterThan(0);
  });

  it('draws a 256th note with six flags and its rest as one, which VexFlow itself does not', () => {
    const rhythm = '1/256 (1/256) 1/128 1/64 1/32 1/16 1/8 3/4';
    const { pages } = engrave({ ...crowded, subjects: [], sections: [{ id: 'w', name: 'W', role: 'other', kind: 'free', lines: [{ instrument: 'a', rhythm }] }] }, 'p', PORTRAIT);
    const glyphs = [...pages[0]!.svg.textContent!].filter((one) => one >= '\uE000');
    // SMuFL 1.4, “Flags” and “Rests”.
    expect(glyphs.filter((one) => one === '\uE24A')).toHaveLength(1);
    expect(glyphs.filter((one) => one === '\uE4EB')).toHaveLength(1);
  });

  it('draws cues before entries, small, and the rests before them as one', () => {
    const lines = [{ instrument: 'a', rhythm: '[(1)]x20 1' }, { instrument: 'd', rhythm: '[1/2 1/2]x21' }];
    const { pages }: { score: PrintScore; pages: { svg: SVGSVGElement }[] } = engrave({ ...crowded, subjects: [], sections: [{ id: 'w', name: 'W', role: 'other', kind: 'free', lines }] }, 'p', PORTRAIT);
    const text = pages[0]!.svg.textContent!;
    expect(text).toContain('(Tam-tam)');
    // SMuFL's digits of time signatures: eighteen measures of rest (SMuFL 1.4, U+E080 to E089).
    expect(text).toContain('\uE081\uE088');
  });
});
