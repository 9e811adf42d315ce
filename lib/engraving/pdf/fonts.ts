import fs from 'node:fs/promises';
import { createRequire } from 'node:module';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import wawoff2 from 'wawoff2';

const { resolve } = createRequire(import.meta.url);

/** A face that a print embeds: its name inside the document, and the whole font as TrueType or OpenType. */
export type PrintFont = { readonly name: string; readonly bytes: Uint8Array };

/** Music: SMuFL's private-use characters. */
export const MUSIC = 'Bravura';
export const TEXT = 'Academico';
export const TEXT_BOLD = 'Academico-Bold';

/** The decompressor answers with its own memory, which the next call overwrites: a copy is kept. */
const decompress = async (woff2: Uint8Array): Promise<Uint8Array> => (await wawoff2.decompress(woff2)).slice();

/** VexFlow carries its fonts as data URLs of WOFF2 in modules of their own, which its package does not name. */
async function fromVexFlow(file: string, name: string): Promise<Uint8Array> {
  const at = path.join(path.dirname(resolve('vexflow')), '../esm/src/fonts', `${file}.js`);
  const carried = (await import(/* @vite-ignore */ pathToFileURL(at).href)) as Record<string, string>;
  const url = carried[name] ?? '';
  return decompress(Buffer.from(url.slice(url.indexOf(',') + 1), 'base64'));
}

async function fromPackage(file: string): Promise<Uint8Array> {
  const folder = path.dirname(resolve('@fontsource-variable/source-serif-4/package.json'));
  return decompress(await fs.readFile(path.join(folder, 'files', `${file}.woff2`)));
}

/** Alphabets that Academico lacks, in the order that they are tried in. */
const OTHERS = ['latin', 'latin-ext', 'vietnamese', 'greek', 'cyrillic', 'cyrillic-ext'] as const;
export const OTHER_TEXT = OTHERS.map((alphabet) => `Serif-${alphabet}`);

let loading: Promise<readonly PrintFont[]> | undefined;

async function load(): Promise<readonly PrintFont[]> {
  const fonts: PrintFont[] = [
    { name: MUSIC, bytes: await fromVexFlow('bravura', 'Bravura') },
    { name: TEXT, bytes: await fromVexFlow('academico', 'Academico') },
    { name: TEXT_BOLD, bytes: await fromVexFlow('academicobold', 'AcademicoBold') },
  ];
  for (const alphabet of OTHERS) fonts.push({ name: `Serif-${alphabet}`, bytes: await fromPackage(`source-serif-4-${alphabet}-wght-normal`) });
  return fonts;
}

/** Every face that a print may need, decompressed once for the process: WOFF2 as it is would be embedded with wrong glyphs. */
export const printFonts = (): Promise<readonly PrintFont[]> => (loading ??= load());
