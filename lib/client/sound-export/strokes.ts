import { type ClickKind, type ClickTrack, type Instrument, type PlayEvent } from '@/engine';
import { SoundBank, type Voice, requestFor } from '../player/bank';
import { dampedAt, strokesOf } from '../player/schedule';
import { clickSamples } from './click-sounds';
import type { RenderStroke } from './render';

const makeBuffer = (rate: number) => ({
  sampleRate: rate,
  createBuffer: (channels: number, length: number, sampleRate: number) => new AudioBuffer({ numberOfChannels: channels, length, sampleRate }),
});

/** The strokes of a study, as the player plays them, their sounds made. @throws AbortError */
export async function musicStrokes(
  events: readonly PlayEvent[],
  instruments: readonly Instrument[],
  rate: number,
  { voice, signal, delay = 0, onProgress = () => undefined }: { voice?: Voice; signal?: AbortSignal; delay?: number; onProgress?: (done: number, total: number) => void } = {},
): Promise<RenderStroke[]> {
  const byId = new Map(instruments.map((instrument) => [instrument.id, instrument]));
  const bank = new SoundBank(makeBuffer(rate), voice);
  await bank.prepare(events, byId, onProgress, () => signal?.aborted !== true);
  signal?.throwIfAborted();
  return strokesOf(events).flatMap((plan): RenderStroke[] => {
    const instrument = byId.get(plan.event.instrument);
    const buffer = instrument && bank.get(requestFor(plan.event, plan.stroke, instrument, rate));
    if (!instrument || !buffer) return [];
    const seconds = plan.seconds + delay;
    const until = dampedAt(plan, seconds, 1);
    return [{ seconds, channel: instrument.id, buffer, gain: plan.gain, ...(until === undefined ? {} : { until }) }];
  });
}

/** The channel of the click: in the middle. */
export const CLICK_CHANNEL = 'click';

/** @param impulse - in place of the sounds, for tests */
export function clickStrokes({ events }: ClickTrack, rate: number, impulse?: Float32Array<ArrayBuffer>): RenderStroke[] {
  const buffers = new Map<ClickKind, AudioBuffer>();
  const bufferOf = (kind: ClickKind): AudioBuffer => {
    let buffer = buffers.get(kind);
    if (buffer === undefined) {
      const samples = impulse ?? clickSamples(kind, rate);
      buffer = new AudioBuffer({ numberOfChannels: 1, length: samples.length, sampleRate: rate });
      buffer.copyToChannel(samples, 0);
      buffers.set(kind, buffer);
    }
    return buffer;
  };
  return events.map(({ seconds, kind }) => ({ seconds: seconds.valueOf(), channel: CLICK_CHANNEL, buffer: bufferOf(kind), gain: 1 }));
}
