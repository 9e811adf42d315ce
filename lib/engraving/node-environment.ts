import { createCanvas, GlobalFonts } from '@napi-rs/canvas';
import { JSDOM } from 'jsdom';
import type { VexFlow } from './notes';

/** A font of VexFlow's, as it ships it: a data address of a WOFF2 file. */
type Shipped = { readonly family: string; readonly weight: 'normal' | 'bold'; readonly data: Buffer };

const bytesOf = (address: string): Buffer => Buffer.from(address.slice(address.indexOf(',') + 1), 'base64');

/**
 * Lets VexFlow draw in a Node process of its own: a document, and a canvas that measures its fonts. It changes the process's
 * globals, so no web server may call it.
 */
export async function openNodeEngraver(): Promise<{ vf: VexFlow; document: Document; fonts: readonly Shipped[] }> {
  const { window } = new JSDOM('<!doctype html><body></body>');
  const { document } = window;
  const loaded: Shipped[] = [];
  /** VexFlow hands its fonts over as a browser's FontFace. */
  class FontFace {
    constructor(family: string, source: string, { weight }: { weight?: string } = {}) {
      const address = /url\((.*)\)/s.exec(source)?.[1] ?? source;
      loaded.push({ family, weight: weight === 'bold' ? 'bold' : 'normal', data: bytesOf(address) });
    }
    load(): Promise<this> {
      return Promise.resolve(this);
    }
  }
  Object.assign(globalThis, { document, window, FontFace, HTMLCanvasElement: window.HTMLCanvasElement, SVGElement: window.SVGElement });
  Object.defineProperty(document, 'fonts', { value: { add: () => undefined, load: () => Promise.resolve([]) } });
  const vf = await import('vexflow/bravura');
  for (const { family, data } of loaded) GlobalFonts.register(data, family);
  // The canvas measures as a browser's does.
  vf.Element.setTextMeasurementCanvas(createCanvas(10, 10) as unknown as HTMLCanvasElement);
  return { vf, document: document as unknown as Document, fonts: loaded };
}
