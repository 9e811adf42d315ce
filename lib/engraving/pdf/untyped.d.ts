declare module 'svg-to-pdfkit' {
  type Options = {
    readonly width?: number;
    readonly height?: number;
    readonly preserveAspectRatio?: string;
    readonly assumePt?: boolean;
    readonly fontCallback?: (family: string, isBold: boolean, isItalic: boolean, made: { fauxBold?: boolean; fauxItalic?: boolean }) => string;
    readonly warningCallback?: (warning: string) => void;
  };
  export default function svgToPdf(document: PDFKit.PDFDocument, svg: string, x: number, y: number, options?: Options): void;
}

declare module 'wawoff2' {
  const wawoff2: { decompress(woff2: Uint8Array): Promise<Uint8Array> };
  export default wawoff2;
}
