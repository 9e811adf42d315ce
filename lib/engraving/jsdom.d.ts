/** What is used of jsdom, which ships no types of its own. */
declare module 'jsdom' {
  export class JSDOM {
    constructor(html?: string);
    readonly window: Window & { readonly DOMParser: typeof DOMParser; readonly HTMLCanvasElement: typeof HTMLCanvasElement; readonly SVGElement: typeof SVGElement };
  }
}
