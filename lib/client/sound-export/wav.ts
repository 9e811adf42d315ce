/** How samples are written. */
export type SampleFormat = { readonly rate: 44_100 | 48_000; readonly bits: 16 | 24 };

const HEADER = 44;
/** RIFF counts its bytes in 32 bits. */
export const MOST_BYTES = 0xffffffff - HEADER;

const ascii = (view: DataView, at: number, text: string): void => [...text].forEach((letter, n) => view.setUint8(at + n, letter.charCodeAt(0)));

/**
 * The head of a WAV file: PCM, stereo (Multimedia Programming Interface and Data Specifications 1.0, IBM and Microsoft, 1991).
 * @param frames - samples of each channel
 */
export function wavHeader(frames: number, { rate, bits }: SampleFormat): Uint8Array<ArrayBuffer> {
  const align = (2 * bits) / 8;
  const bytes = frames * align;
  const view = new DataView(new ArrayBuffer(HEADER));
  ascii(view, 0, 'RIFF');
  view.setUint32(4, HEADER - 8 + bytes, true);
  ascii(view, 8, 'WAVEfmt ');
  view.setUint32(16, 16, true);
  view.setUint16(20, 1, true);
  view.setUint16(22, 2, true);
  view.setUint32(24, rate, true);
  view.setUint32(28, rate * align, true);
  view.setUint16(32, align, true);
  view.setUint16(34, bits, true);
  ascii(view, 36, 'data');
  view.setUint32(40, bytes, true);
  return new Uint8Array(view.buffer);
}

/**
 * Samples as integers, the least significant byte first; what lies beyond full scale stays at its end.
 * @param interleaved - left and right in turn, full scale from −1 to 1
 */
export function toPcm(interleaved: Float32Array, gain: number, bits: 16 | 24): Uint8Array<ArrayBuffer> {
  const size = bits / 8;
  const full = 2 ** (bits - 1);
  const bytes = new Uint8Array(interleaved.length * size);
  for (let n = 0; n < interleaved.length; n += 1) {
    const value = Math.max(-full, Math.min(full - 1, Math.round(interleaved[n]! * gain * full)));
    for (let byte = 0; byte < size; byte += 1) bytes[n * size + byte] = (value >> (8 * byte)) & 0xff;
  }
  return bytes;
}
