import fs from 'node:fs';
import { JSDOM } from 'jsdom';
import { describe, expect, it } from 'vitest';
import { fontRuns } from '@/lib/engraving/pdf/font-runs';
import { writePdf } from '@/lib/engraving/pdf/write-pdf';
import { readPdf } from '../helpers/read-pdf';

const { document } = new JSDOM().window;
const MADE_AT = new Date('2026-01-02T03:04:05.000Z');

function page(inner: string, width = 595.28, height = 841.89): Element {
  const holder = document.createElement('div');
  holder.innerHTML = `<svg xmlns="http://www.w3.org/2000/svg" width="${width}pt" height="${height}pt" viewBox="0 0 ${width} ${height}" font-family="Bravura, Academico">${inner}</svg>`;
  return holder.firstElementChild!;
}

const TITLE = 'Lock – Плотина Ωmega';
const pages = () => [
  page(`<text x="40" y="60" font-size="20" font-weight="bold">${TITLE}</text><text x="40" y="100" font-size="12px" style="font-style: italic">with a hard stick</text>
    <text x="40" y="140" font-family="Bravura, Academico" font-size="30pt">\uE0A4\uE1D5 = 84</text><path d="M10 10L90 10" stroke="currentColor"/>`),
  page('<text x="40" y="60">Second</text>', 612, 792),
];

describe('a print as PDF', () => {
  it('has the pages in their sizes, its text as text in any alphabet of the faces, and what it is', async () => {
    const bytes = await writePdf(pages(), { title: TITLE, author: 'Iva Towpath', label: 'Player 1', madeAt: MADE_AT });
    if (process.env.SESQUI_LOOK) fs.writeFileSync(process.env.SESQUI_LOOK, bytes);
    const { texts, sizes, labels, info } = await readPdf(bytes);
    expect(sizes.map((box) => box.slice(2).map(Math.round))).toEqual([[595, 842], [612, 792]]);
    expect(texts[0]?.replaceAll(' ', '')).toContain(TITLE.replaceAll(' ', ''));
    expect(texts[0]).toContain('with a hard stick');
    expect(texts[0]).toContain('= 84');
    expect(texts[1]).toBe('Second');
    expect(labels).toEqual(['Player 1 – 1', 'Player 1 – 2']);
    expect(info).toMatchObject({ Title: TITLE, Author: 'Iva Towpath', Producer: 'Sesqui', Creator: 'Sesqui' });
  });

  it('says where a character has no face, and composes letters and accents', async () => {
    const { texts } = await readPdf(await writePdf([page('<text x="40" y="60">水門 weir</text><text x="40" y="90">Cafe\u0301</text>')], { title: TITLE, madeAt: MADE_AT }));
    expect(texts[0]).toContain('?? weir');
    expect(texts[0]).toContain('Caf\u00e9');
  });

  it('embeds the music font and the faces of text, as far as they are used', async () => {
    const bytes = Buffer.from(await writePdf(pages(), { title: TITLE, madeAt: MADE_AT })).toString('latin1');
    const names = [...bytes.matchAll(/\/FontName \/[A-Z]{6}\+([\w-]+)/g)].map(([, name]) => name);
    expect(new Set(names)).toEqual(new Set(['Bravura', 'Academico', 'Academico-Bold', ...names.filter((name) => name?.startsWith('SourceSerif'))]));
    expect(bytes.match(/\/FontFile[23] /g)?.length).toBe(names.length);
  });

  it('is the same to the byte for the same pages', async () => {
    const [a, b] = [await writePdf(pages(), { title: TITLE, madeAt: MADE_AT }), await writePdf(pages(), { title: TITLE, madeAt: MADE_AT })];
    expect(Buffer.compare(a, b)).toBe(0);
  });

  it('tells how many pages are made', async () => {
    const told: number[] = [];
    await writePdf(pages(), { title: TITLE, madeAt: MADE_AT }, (done) => void told.push(done));
    expect(told).toEqual([1, 2]);
  });
});

describe('the face of each piece of a text', () => {
  const has = (face: string, codePoint: number) => (face.startsWith('Academico') ? codePoint < 0x300 : face === 'Serif-cyrillic' && codePoint >= 0x400 && codePoint < 0x500);
  it.each([
    ['Weir', false, [['Academico', 'Weir']]],
    ['Weir', true, [['Academico-Bold', 'Weir']]],
    ['\uE1D5 = 84', false, [['Bravura', '\uE1D5'], ['Academico', ' = 84']]],
    ['a Я b', false, [['Academico', 'a '], ['Serif-cyrillic', 'Я'], ['Academico', ' b']]],
    ['Cafe\u0301', false, [['Academico', 'Caf\u00e9']]],
    ['a水b', false, [['Academico', 'a?b']]],
    ['', false, []],
  ] as const)('%j, bold %s', (text, isBold, runs) => {
    expect(fontRuns(text, isBold, has).map((run) => [run.face, run.text])).toEqual(runs);
  });
});
