import type { Measure, Picture } from './svg';

const FAMILY = 'Archivo Variable';

/** Measures with the page's own fonts. */
export function pageMeasure(): Measure {
  const context = document.createElement('canvas').getContext('2d');
  return (text, size, weight) => {
    if (!context) return text.length * size * 0.6;
    context.font = `${weight} ${size}px '${FAMILY}', sans-serif`;
    return context.measureText(text).width;
  };
}

/** The addresses of the page's text face: a picture that is drawn apart from the page has no fonts but those it brings along. */
function faces(): { readonly source: string; readonly range: string }[] {
  const found: { source: string; range: string }[] = [];
  for (const sheet of document.styleSheets) {
    for (const rule of sheet.cssRules) {
      if (!(rule instanceof CSSFontFaceRule) || !rule.style.getPropertyValue('font-family').includes(FAMILY)) continue;
      const address = /url\("?([^")]+)"?\)/.exec(rule.style.getPropertyValue('src'))?.[1];
      if (address) found.push({ source: new URL(address, sheet.href ?? location.href).href, range: rule.style.getPropertyValue('unicode-range') });
    }
  }
  return found;
}

async function asData(address: string, signal: AbortSignal): Promise<string> {
  const blob = await (await fetch(address, { signal })).blob();
  return new Promise((resolve, reject) => {
    const reader = new FileReader();
    reader.onload = () => resolve(String(reader.result));
    reader.onerror = () => reject(reader.error ?? new Error('A font could not be read.'));
    reader.readAsDataURL(blob);
  });
}

/** The picture with its text face inside; without it where it cannot be had. */
async function withFaces({ svg }: Picture, signal: AbortSignal): Promise<string> {
  try {
    const rules = await Promise.all(
      faces().map(async ({ source, range }) => `@font-face{font-family:'${FAMILY}';font-weight:100 900;font-stretch:62% 125%;src:url(${await asData(source, signal)});${range ? `unicode-range:${range}` : ''}}`),
    );
    return svg.replace('<title', `<style>${rules.join('')}</style><title`);
  } catch (error) {
    if (signal.aborted) throw error;
    return svg;
  }
}

/**
 * Draws a picture in pixels, two for each of its own.
 * @throws Error with a sentence where the browser cannot
 */
export async function toPng(drawn: Picture, signal: AbortSignal, scale = 2): Promise<Blob> {
  const address = URL.createObjectURL(new Blob([await withFaces(drawn, signal)], { type: 'image/svg+xml' }));
  try {
    const image = new Image();
    image.src = address;
    await image.decode();
    signal.throwIfAborted();
    const canvas = document.createElement('canvas');
    canvas.width = Math.round(drawn.width * scale);
    canvas.height = Math.round(drawn.height * scale);
    canvas.getContext('2d')?.drawImage(image, 0, 0, canvas.width, canvas.height);
    const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
    if (!blob) throw new Error('This browser cannot draw a picture of that size: take the SVG instead.');
    return blob;
  } finally {
    URL.revokeObjectURL(address);
  }
}
