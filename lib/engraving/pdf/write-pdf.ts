import PDFDocument from 'pdfkit';
import svgToPdf from 'svg-to-pdfkit';
import { type Coverage, setFaces } from './font-runs';
import { printFonts, TEXT, TEXT_BOLD } from './fonts';

export type PdfInfo = {
  readonly title: string;
  readonly author?: string | undefined;
  /** what stands before the number of a page where a reader shows it, such as a player's name */
  readonly label?: string | undefined;
  /** when the music was saved; the document says that it was made then, so that the same music makes the same bytes */
  readonly madeAt: Date;
};

type Internals = {
  readonly _font: { readonly font: { hasGlyphForCodePoint(codePoint: number): boolean } };
  readonly _root: { readonly data: Record<string, unknown> };
};

/** Fonts opened once for a document, asked which characters they have. */
function coverageOf(document: PDFKit.PDFDocument): Coverage {
  const known = new Map<string, boolean>();
  return (face, codePoint) => {
    const key = `${face} ${codePoint}`;
    const before = known.get(key);
    if (before !== undefined) return before;
    const has = (document.font(face) as unknown as Internals)._font.font.hasGlyphForCodePoint(codePoint);
    known.set(key, has);
    return has;
  };
}

/** The width and height of a page in points. */
function sizeOf(svg: Element): [number, number] {
  const [width, height] = ['width', 'height'].map((name) => Number(/^([\d.]+)pt$/.exec(svg.getAttribute(name) ?? '')?.[1]));
  if (!width || !height) throw new Error('A page does not say how large it is, in points.');
  return [width, height];
}

const facesFor = (face: string, isBold: boolean, isItalic: boolean, made: { fauxBold?: boolean; fauxItalic?: boolean }): string => {
  // Academico comes upright and bold only: what is asked for besides is slanted or thickened by the writer.
  if (isItalic) made.fauxItalic = true;
  if (isBold && face !== TEXT_BOLD && face !== TEXT) made.fauxBold = true;
  return face === TEXT && isBold ? TEXT_BOLD : face;
};

/**
 * Writes pages as a PDF: vectors, the fonts embedded as far as they are used, text as text. The same pages and the same
 * `madeAt` give the same bytes.
 * @param pages - one SVG element for each page, its width and height in points; they are changed
 * @param onPage - called after each page with how many there are so far
 */
export async function writePdf(pages: Iterable<Element> | AsyncIterable<Element>, info: PdfInfo, onPage: (done: number) => void | Promise<void> = () => undefined): Promise<Uint8Array> {
  const document = new PDFDocument({
    autoFirstPage: false,
    pdfVersion: '1.7',
    lang: 'en',
    displayTitle: true,
    info: { Title: info.title, ...(info.author ? { Author: info.author } : {}), Creator: 'Sesqui', Producer: 'Sesqui', CreationDate: info.madeAt },
  });
  const pieces: Uint8Array[] = [];
  document.on('data', (piece: Uint8Array) => pieces.push(piece));
  const ended = new Promise<void>((resolve, reject) => document.once('end', resolve).once('error', reject));
  for (const { name, bytes } of await printFonts()) document.registerFont(name, Buffer.from(bytes));
  const has = coverageOf(document);
  let count = 0;
  for await (const svg of pages) {
    const [width, height] = sizeOf(svg);
    setFaces(svg, has);
    svg.setAttribute('color', 'black');
    document.addPage({ size: [width, height], margin: 0 });
    svgToPdf(document, svg.outerHTML, 0, 0, { width, height, preserveAspectRatio: 'xMinYMin meet', assumePt: true, fontCallback: facesFor, warningCallback: () => undefined });
    count += 1;
    await onPage(count);
  }
  const label = info.label ? { P: new String(`${info.label} – `), S: 'D' } : { S: 'D' };
  (document as unknown as Internals)._root.data.PageLabels = { Nums: [0, label] };
  document.end();
  await ended;
  return Buffer.concat(pieces);
}
