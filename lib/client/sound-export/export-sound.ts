import { Zip, ZipPassThrough } from 'fflate';
import { type BuiltStudy, type Study, clickEvents, clockOf, playEvents } from '@/engine';
import { distinctNames, fileName } from '@/lib/file-names';
import type { Voice } from '../player/bank';
import { PLAYER } from '../player/settings';
import { breathe } from '../player/slices';
import { BlobSink } from './blob-sink';
import { inPieces } from './in-pieces';
import { type RenderJob, type RenderStroke, renderSlices } from './render';
import { CLICK_CHANNEL, clickStrokes, musicStrokes } from './strokes';
import { MOST_BYTES, type SampleFormat, toPcm, wavHeader } from './wav';

/** −1 dBFS: the loudest sample of the mix comes no higher. */
export const LOUDEST = 10 ** (-1 / 20);

export type SoundWish =
  | { readonly what: 'mix' }
  | { readonly what: 'stems' }
  /** for these players, by id */
  | { readonly what: 'clicks'; readonly players: readonly string[]; readonly countIn?: number; readonly withMusic: boolean };

export type SoundFile = { readonly blob: Blob; readonly name: string };
export type SoundOptions = {
  readonly format?: SampleFormat;
  readonly signal?: AbortSignal;
  /** share of the work that is done, 0 to 1 */
  readonly onProgress?: (share: number) => void;
  /** in place of the synthesised sounds, for tests */
  readonly voice?: Voice;
};

/** A file of sound that cannot be made, with a sentence that says why. */
export class SoundExportError extends Error {}

/** Samples turned into bytes before the page gets its turn. */
const PCM_PIECE = 1 << 17;

type Layer = { readonly name: string; readonly strokes: readonly RenderStroke[] };
type Job = Omit<RenderJob, 'strokes'>;

function framesFor(seconds: number, layers: number, { rate, bits }: SampleFormat): number {
  const frames = Math.ceil((seconds + PLAYER.longestSound) * rate);
  const bytes = (frames * 2 * bits) / 8;
  if (bytes * Math.max(1, layers) > MOST_BYTES) {
    throw new SoundExportError(`This would be ${((bytes * layers) / 1e9).toFixed(1)} GB of sound, and the files hold 4.2 at most. Choose 16 bits, or take fewer at a time.`);
  }
  return frames;
}

/** The loudest sample of a layer: it is rendered and forgotten, so that nothing of it is kept until its gain is known. */
async function peakOf({ strokes }: Layer, job: Job, onFrames: (frames: number) => void, signal?: AbortSignal): Promise<number> {
  let peak = 0;
  for await (const samples of renderSlices({ ...job, strokes }, signal)) {
    await inPieces(samples.length, (from, to) => {
      for (let n = from; n < to; n += 1) peak = Math.max(peak, Math.abs(samples[n]!));
    });
    onFrames(samples.length / 2);
  }
  return peak;
}

/** A layer as the bytes of a WAV file, piece by piece. */
async function* wavBytes({ strokes }: Layer, job: Job, gain: number, format: SampleFormat, onFrames: (frames: number) => void, signal?: AbortSignal): AsyncGenerator<Uint8Array<ArrayBuffer>> {
  yield wavHeader(job.frames, format);
  for await (const samples of renderSlices({ ...job, strokes }, signal)) {
    for (let from = 0; from < samples.length; from += PCM_PIECE) {
      yield toPcm(samples.subarray(from, from + PCM_PIECE), gain, format.bits);
      await breathe();
    }
    onFrames(samples.length / 2);
  }
}

async function blobOf(bytes: AsyncIterable<Uint8Array<ArrayBuffer>>): Promise<Blob> {
  const sink = new BlobSink();
  for await (const piece of bytes) sink.push(piece);
  return sink.blob('audio/wav');
}

/** WAV files side by side in a zip, stored as they are: what is made goes to the browser piece by piece. */
async function zipOf(files: readonly { readonly name: string; readonly bytes: AsyncIterable<Uint8Array<ArrayBuffer>> | readonly Uint8Array<ArrayBuffer>[] }[]): Promise<Blob> {
  const sink = new BlobSink();
  const zip = new Zip((error, data) => {
    if (error) throw error;
    sink.push(new Uint8Array(data));
  });
  for (const { name, bytes } of files) {
    const entry = new ZipPassThrough(name);
    entry.mtime = '1980-01-01T00:00:00';
    zip.add(entry);
    for await (const piece of bytes) entry.push(piece);
    entry.push(new Uint8Array(), true);
  }
  zip.end();
  return sink.blob('application/zip');
}

/** A browser that has no room for a file takes it without a word, and cannot read it. */
async function kept(file: SoundFile): Promise<SoundFile> {
  try {
    await file.blob.slice(-1).arrayBuffer();
    return file;
  } catch {
    throw new SoundExportError(`The browser has no room to keep ${Math.round(file.blob.size / 1e6)} MB of sound. Choose 16 bits, or take less at a time; a private window keeps less than an ordinary one.`);
  }
}

const gainFor = (peak: number): number => (peak > LOUDEST ? LOUDEST / peak : 1);

/**
 * Renders a study to WAV through Tone's offline clock: the mix; a stem for each instrument that sounds, in a zip; or a click for
 * each player, alone or with the music. The player's ceiling is left out, so that stems add up to the mix: one gain for all of
 * them keeps the loudest sample of the mix at −1 dBFS at most.
 * @throws SoundExportError with a sentence; AbortError where it was given up
 */
export async function exportSound(study: Study, built: BuiltStudy, wish: SoundWish, options: SoundOptions = {}): Promise<SoundFile> {
  const { format = { rate: 44_100, bits: 24 }, signal, onProgress, voice } = options;
  const { rate } = format;
  const events = playEvents(study, built);
  const duration = clockOf(study, built).total.valueOf();
  const all = study.instruments.map(({ id }) => id);
  if (wish.what !== 'clicks' && events.length === 0) throw new SoundExportError('Nothing sounds in this study yet.');
  // Making the sounds is a tenth of the work, as near as it can be told beforehand.
  const sounds = { ...(voice === undefined ? {} : { voice }), ...(signal === undefined ? {} : { signal }), onProgress: (done: number, total: number) => onProgress?.((0.1 * done) / total) };

  /** Renders twice: once for the loudest sample, once into files. */
  const render = async (loudest: readonly Layer[], layers: readonly Layer[], job: Job, names: readonly string[], archive: string, about: ((gain: number) => string) | null): Promise<SoundFile> => {
    const total = job.frames * (loudest.length + layers.length);
    let done = 0;
    const onFrames = (frames: number): void => onProgress?.(0.1 + (0.9 * (done += frames)) / total);
    let peak = 0;
    for (const layer of loudest) peak = Math.max(peak, await peakOf(layer, job, onFrames, signal));
    const gain = gainFor(peak);
    const files = layers.map((layer, index) => ({ name: names[index]!, bytes: wavBytes(layer, job, gain, format, onFrames, signal) }));
    if (files.length === 1 && about === null) return kept({ blob: await blobOf(files[0]!.bytes), name: files[0]!.name });
    const words = about === null ? [] : [{ name: 'about.txt', bytes: [new TextEncoder().encode(about(gain))] }];
    return kept({ blob: await zipOf([...words, ...files]), name: archive });
  };

  if (wish.what === 'clicks') {
    const players = study.players.filter(({ id }) => wish.players.includes(id));
    if (players.length === 0) throw new SoundExportError('Choose a player to make a click for.');
    const tracks = players.map((player) => ({ player, track: clickEvents(study, built, { player: player.id, ...(wish.countIn === undefined ? {} : { countIn: wish.countIn }) }) }));
    const lead = tracks[0]!.track.lead.valueOf();
    const music = wish.withMusic ? await musicStrokes(events, study.instruments, rate, { ...sounds, delay: lead }) : [];
    const layers = tracks.map(({ player, track }): Layer => ({ name: player.name, strokes: [...clickStrokes(track, rate), ...music].sort((a, b) => a.seconds - b.seconds) }));
    // The click stands in the middle of the picture.
    const half = Math.ceil(all.length / 2);
    const channels = wish.withMusic ? [...all.slice(0, half), CLICK_CHANNEL, ...all.slice(half)] : [CLICK_CHANNEL];
    const names = distinctNames(players.map(({ name }) => fileName([study.title, name, 'click'], 'wav')));
    return render(layers, layers, { channels, rate, frames: framesFor(lead + duration, layers.length, format) }, names, fileName([study.title, 'clicks'], 'zip'), null);
  }

  const mix: Layer = { name: study.title, strokes: await musicStrokes(events, study.instruments, rate, sounds) };
  if (wish.what === 'mix') return render([mix], [mix], { channels: all, rate, frames: framesFor(duration, 1, format) }, [fileName([study.title], 'wav')], '', null);
  const sounding = study.instruments.filter(({ id }) => events.some(({ instrument }) => instrument === id));
  const stems = sounding.map(({ id, name }): Layer => ({ name, strokes: mix.strokes.filter(({ channel }) => channel === id) }));
  const about = (gain: number): string =>
    `${study.title}\nStems: one file for each instrument that sounds, all of the same length, beginning together.\n${rate} samples a second, ${format.bits} bits, stereo. Added up they are the mix; all were turned down by the same ${Math.abs(20 * Math.log10(gain)).toFixed(2)} dB.\n`;
  const names = distinctNames(sounding.map(({ name }) => fileName([study.title, name], 'wav')));
  return render([mix], stems, { channels: all, rate, frames: framesFor(duration, stems.length, format) }, names, fileName([study.title, 'stems'], 'zip'), about);
}
