import { type StudyInput, buildStudy, clickEvents, parseStudy, playEvents } from '../../../engine';
import { type SoundWish, exportSound } from '../../../lib/client/sound-export/export-sound';
import { renderSlices } from '../../../lib/client/sound-export/render';
import { musicStrokes } from '../../../lib/client/sound-export/strokes';
import type { Voice } from '../../../lib/client/player';

/** Built by the test into one script, it runs inside the browser: the page's `window.exported`. */

const WIDTH = 10;
const impulse: Voice = () => new Float32Array(WIDTH).fill(1);

type Wave = { readonly rate: number; readonly bits: number; readonly frames: number; readonly at: (frame: number, channel: 0 | 1) => number };

/** Reads a WAV file by its chunks; integers as they are written. */
function readWave(bytes: Uint8Array): Wave {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const word = (at: number): string => String.fromCharCode(...bytes.subarray(at, at + 4));
  if (word(0) !== 'RIFF' || word(8) !== 'WAVE' || view.getUint32(4, true) !== bytes.byteLength - 8) throw new Error('no RIFF file');
  let [rate, bits, data, size] = [0, 0, 0, 0];
  for (let at = 12; at + 8 <= bytes.byteLength; at += 8 + view.getUint32(at + 4, true)) {
    if (word(at) === 'fmt ') [rate, bits] = [view.getUint32(at + 12, true), view.getUint16(at + 22, true)];
    if (word(at) === 'data') [data, size] = [at + 8, view.getUint32(at + 4, true)];
  }
  const width = bits / 8;
  const value = (at: number): number => (width === 2 ? view.getInt16(at, true) : (view.getUint8(at) | (view.getUint8(at + 1) << 8) | (view.getInt8(at + 2) << 16)));
  return { rate, bits, frames: size / width / 2, at: (frame, channel) => value(data + (frame * 2 + channel) * width) };
}

/** The entries of a zip of stored files by its central directory (PKWARE, APPNOTE 4.3.12), one read at a time. */
async function* storedEntries(zip: Blob): AsyncGenerator<{ name: string; bytes: Uint8Array }> {
  const tail = new Uint8Array(await zip.slice(-22).arrayBuffer());
  const end = new DataView(tail.buffer);
  if (end.getUint32(0, true) !== 0x06054b50) throw new Error('no zip file');
  const directory = new DataView(await zip.slice(end.getUint32(16, true), end.getUint32(16, true) + end.getUint32(12, true)).arrayBuffer());
  for (let at = 0; at < directory.byteLength; ) {
    const [method, size, names, extra, comment, offset] = [directory.getUint16(at + 10, true), directory.getUint32(at + 24, true), directory.getUint16(at + 28, true), directory.getUint16(at + 30, true), directory.getUint16(at + 32, true), directory.getUint32(at + 42, true)];
    if (method !== 0) throw new Error('not stored');
    const local = new DataView(await zip.slice(offset, offset + 30).arrayBuffer());
    const from = offset + 30 + local.getUint16(26, true) + local.getUint16(28, true);
    yield { name: new TextDecoder().decode(new Uint8Array(directory.buffer, at + 46, names)), bytes: new Uint8Array(await zip.slice(from, from + size).arrayBuffer()) };
    at += 46 + names + extra + comment;
  }
}

type Onset = { readonly time: number; readonly level: number };

/** Where silence ends, by the louder side; two impulses are never closer than their width. */
function onsetsOf({ rate, bits, frames, at }: Wave): Onset[] {
  const full = 2 ** (bits - 1);
  const level = (frame: number): number => Math.max(Math.abs(at(frame, 0)), Math.abs(at(frame, 1))) / full;
  const onsets: Onset[] = [];
  for (let frame = 0; frame < frames; frame += 1) {
    if (level(frame) < 1e-4) continue;
    let most = 0;
    for (let n = frame; n < Math.min(frames, frame + WIDTH + 2); n += 1) most = Math.max(most, level(n));
    onsets.push({ time: frame / rate, level: most });
    frame += WIDTH + 1;
  }
  return onsets;
}

function peakOf({ bits, frames, at }: Wave): number {
  let peak = 0;
  for (let frame = 0; frame < frames; frame += 1) peak = Math.max(peak, Math.abs(at(frame, 0)), Math.abs(at(frame, 1)));
  return peak / 2 ** (bits - 1);
}

type Asked = { readonly document: StudyInput; readonly wish: SoundWish; readonly real?: boolean; readonly bits?: 16 | 24; /** share of the work after which it is given up */ readonly abortAt?: number };

async function make<T>({ document, wish, real = false, bits = 24, abortAt }: Asked, read: (wave: Wave) => T) {
  const study = parseStudy(document);
  const control = new AbortController();
  let longest = 0;
  const observer = new PerformanceObserver((list) => {
    for (const { duration } of list.getEntries()) longest = Math.max(longest, duration);
  });
  observer.observe({ type: 'longtask' });
  const began = performance.now();
  const shares: number[] = [];
  try {
    const file = await exportSound(study, buildStudy(study), wish, {
      format: { rate: 44_100, bits },
      signal: control.signal,
      ...(real ? {} : { voice: impulse }),
      onProgress: (share) => {
        shares.push(share);
        if (abortAt !== undefined && share >= abortAt) control.abort();
      },
    });
    const milliseconds = performance.now() - began;
    observer.disconnect();
    const files: { name: string; read: T }[] = [];
    if (file.name.endsWith('.zip')) {
      for await (const { name, bytes } of storedEntries(file.blob)) if (name.endsWith('.wav')) files.push({ name, read: read(readWave(bytes)) });
    } else files.push({ name: file.name, read: read(readWave(new Uint8Array(await file.blob.arrayBuffer()))) });
    return { name: file.name, files, milliseconds, longest, shares };
  } finally {
    observer.disconnect();
  }
}

/** Names, lengths, peaks and onsets of what an export makes. */
async function look(asked: Asked & { readonly withOnsets?: boolean }) {
  try {
    const { name, files, milliseconds, longest, shares } = await make(asked, (wave) => ({ frames: wave.frames, rate: wave.rate, bits: wave.bits, peak: peakOf(wave), onsets: asked.withOnsets === false ? [] : onsetsOf(wave) }));
    return {
      error: null,
      name,
      milliseconds,
      longest,
      inOrder: shares.every((share, n) => n === 0 || share >= shares[n - 1]! - 1e-9),
      files: files.map(({ name: file, read }) => ({ name: file, ...read })),
    };
  } catch (error) {
    return { error: error instanceof Error ? error.name : 'unknown', name: '', milliseconds: 0, longest: 0, inOrder: true, files: [] };
  }
}

/** The greatest difference between the mix and its stems added up, in steps of the sample format. */
async function sumError(document: StudyInput) {
  const mix = (await make({ document, wish: { what: 'mix' }, real: true }, (wave) => wave)).files[0]!.read;
  const stems = (await make({ document, wish: { what: 'stems' }, real: true }, (wave) => wave)).files.map(({ read }) => read);
  let worst = 0;
  for (let frame = 0; frame < mix.frames; frame += 1) {
    for (const channel of [0, 1] as const) worst = Math.max(worst, Math.abs(stems.reduce((sum, stem) => sum + stem.at(frame, channel), 0) - mix.at(frame, channel)));
  }
  return { worst, stems: stems.length, frames: mix.frames, sameLength: stems.every(({ frames }) => frames === mix.frames) };
}

/** The greatest difference between one rendering and one of slices joined, of full scale. */
async function sliceError(document: StudyInput, seconds: number) {
  const study = parseStudy(document);
  const built = buildStudy(study);
  const rate = 44_100;
  const strokes = await musicStrokes(playEvents(study, built), study.instruments, rate);
  const job = { strokes, channels: study.instruments.map(({ id }) => id), rate, frames: Math.round(seconds * rate) };
  const collect = async (slice: number): Promise<Float32Array> => {
    const all = new Float32Array(job.frames * 2);
    let at = 0;
    for await (const piece of renderSlices(job, undefined, slice)) {
      all.set(piece, at);
      at += piece.length;
    }
    return all;
  };
  const [whole, sliced] = [await collect(seconds), await collect(2.5)];
  let worst = 0;
  let loudest = 0;
  for (let n = 0; n < whole.length; n += 1) {
    worst = Math.max(worst, Math.abs(whole[n]! - sliced[n]!));
    loudest = Math.max(loudest, Math.abs(whole[n]!));
  }
  return { worst, loudest };
}

/** Loudness of the mix in a window of time, of full scale. */
async function loudnessBetween(document: StudyInput, from: number, to: number) {
  const { rate, bits, at } = (await make({ document, wish: { what: 'mix' }, real: true }, (wave) => wave)).files[0]!.read;
  let peak = 0;
  for (let frame = Math.round(from * rate); frame < to * rate; frame += 1) peak = Math.max(peak, Math.abs(at(frame, 0)), Math.abs(at(frame, 1)));
  return peak / 2 ** (bits - 1);
}

function clicks(document: StudyInput, player: string) {
  const study = parseStudy(document);
  const { events, lead } = clickEvents(study, buildStudy(study), { player });
  return { lead: lead.valueOf(), times: events.map(({ seconds }) => seconds.valueOf()) };
}

declare global {
  interface Window {
    exported: { look: typeof look; sumError: typeof sumError; sliceError: typeof sliceError; loudnessBetween: typeof loudnessBetween; clicks: typeof clicks };
  }
}

window.exported = { look, sumError, sliceError, loudnessBetween, clicks };
