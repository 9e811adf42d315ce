import { Gain, OfflineContext } from 'tone';
import { Run } from '../player/mixer';
import { inPieces } from './in-pieces';

/** One stroke of a rendering. */
export type RenderStroke = {
  /** from the beginning */
  readonly seconds: number;
  /** its channel, by which it is placed from left to right */
  readonly channel: string;
  readonly buffer: AudioBuffer;
  readonly gain: number;
  /** where it is stopped short */
  readonly until?: number;
};

export type RenderJob = {
  /** in order of time */
  readonly strokes: readonly RenderStroke[];
  /** every channel, from left to right, also those that are silent here */
  readonly channels: readonly string[];
  /** samples a second */
  readonly rate: number;
  /** samples of the whole */
  readonly frames: number;
};

/** Seconds of music rendered at a time. */
export const SLICE_SECONDS = 8;

function firstAt(strokes: readonly RenderStroke[], seconds: number): number {
  let [low, high] = [0, strokes.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (strokes[middle]!.seconds < seconds) low = middle + 1;
    else high = middle;
  }
  return low;
}

/**
 * Renders samples from `first` on. What was struck before and still rings is struck again ahead of the slice, so that slices
 * joined are what one rendering would be.
 * @returns left and right in turn
 */
async function renderSlice({ strokes, channels, rate }: RenderJob, first: number, frames: number, rings: number): Promise<Float32Array<ArrayBuffer>> {
  const ahead = Math.min(first, Math.ceil(rings * rate));
  const from = (first - ahead) / rate;
  const context = new OfflineContext(2, (ahead + frames) / rate, rate);
  const input = new Gain({ context, gain: 1 });
  input.connect(context.destination);
  const run = new Run(context, { input }, () => true);
  run.addChannels([...channels]);
  const end = (first + frames) / rate;
  for (let n = firstAt(strokes, from); n < strokes.length && strokes[n]!.seconds < end; n += 1) {
    const { seconds, channel, buffer, gain, until } = strokes[n]!;
    run.sound(buffer, channel, seconds - from, gain, until === undefined ? undefined : until - from);
  }
  const rendered = await context.render();
  const [left, right] = [rendered.getChannelData(0), rendered.getChannelData(1)];
  const interleaved = new Float32Array(frames * 2);
  await inPieces(frames, (from, to) => {
    for (let n = from; n < to; n += 1) {
      interleaved[2 * n] = left[ahead + n]!;
      interleaved[2 * n + 1] = right[ahead + n]!;
    }
  });
  rendered.dispose();
  context.dispose();
  return interleaved;
}

/** Renders a job slice by slice; Tone's offline clock gives the page its turn on the way. */
export async function* renderSlices(job: RenderJob, signal?: AbortSignal, sliceSeconds = SLICE_SECONDS): AsyncGenerator<Float32Array<ArrayBuffer>> {
  const slice = Math.round(sliceSeconds * job.rate);
  // How far back something may have been struck that still sounds.
  const rings = job.strokes.reduce((longest, { buffer }) => Math.max(longest, buffer.duration), 0) + 0.1;
  for (let first = 0; first < job.frames; first += slice) {
    signal?.throwIfAborted();
    yield await renderSlice(job, first, Math.min(slice, job.frames - first), rings);
  }
}
