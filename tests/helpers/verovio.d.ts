declare module 'verovio/wasm' {
  export default function createVerovioModule(): Promise<object>;
}
declare module 'verovio/esm' {
  export type TimemapEntry = { readonly qstamp: number; readonly tstamp: number; readonly on?: readonly string[]; readonly off?: readonly string[] };
  export class VerovioToolkit {
    constructor(module: object);
    getVersion(): string;
    setOptions(options: Record<string, unknown>): void;
    loadData(data: string): 0 | 1;
    renderToTimemap(options?: Record<string, unknown>): TimemapEntry[];
    getLog(): string;
    renderToSVG(page: number): string;
    getMEI(options?: Record<string, unknown>): string;
  }
}
