declare module 'jsdom' {
  /** The part of jsdom that the tests ask for: the browser's own reader of XML. */
  export class JSDOM {
    readonly window: { readonly DOMParser: typeof DOMParser };
  }
}
