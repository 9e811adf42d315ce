import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';

export type ReadPdf = {
  readonly texts: readonly string[];
  /** [left, bottom, right, top] of each page, in points */
  readonly sizes: readonly (readonly number[])[];
  readonly labels: readonly string[] | null;
  readonly info: Record<string, unknown>;
};

/** A PDF as an independent reader sees it: the text of each page, its size, and what the document says of itself. */
export async function readPdf(bytes: Uint8Array): Promise<ReadPdf> {
  const pdf = await getDocument({ data: new Uint8Array(bytes), useSystemFonts: false, verbosity: 0 }).promise;
  const texts: string[] = [];
  const sizes: number[][] = [];
  for (let n = 1; n <= pdf.numPages; n += 1) {
    const page = await pdf.getPage(n);
    sizes.push(page.view);
    texts.push((await page.getTextContent()).items.map((item) => ('str' in item ? item.str : '')).join(' ').replaceAll(/ +/g, ' '));
  }
  return { texts, sizes, labels: await pdf.getPageLabels(), info: (await pdf.getMetadata()).info as Record<string, unknown> };
}
