import type { BaseContext } from 'tone';
import type { Instrument, PlayEvent } from '@/engine';
import { runInSlices } from './slices';
import { type SoundRequest, soundKey, soundSteps } from './sounds';

/** Makes the samples of one sound; tests put an impulse in its place. */
export type Voice = (request: SoundRequest) => Float32Array<ArrayBuffer> | Promise<Float32Array<ArrayBuffer>>;

const synthesised: Voice = (request) => runInSlices(soundSteps(request));

/** The sound that a stroke of an event needs: a roll's later strokes have no accent. */
export const requestFor = (event: PlayEvent, stroke: number, instrument: Instrument, rate: number): SoundRequest => ({
  instrument,
  sound: event.sound ?? 1,
  accent: stroke === 0 ? (event.accent ?? 'none') : 'none',
  rate,
});

/** Renders sounds when they are first needed and keeps them. */
export class SoundBank {
  private readonly buffers = new Map<string, AudioBuffer>();

  constructor(
    private readonly context: Pick<BaseContext, 'sampleRate' | 'createBuffer'>,
    private readonly voice: Voice = synthesised,
  ) {}

  get(request: SoundRequest): AudioBuffer | undefined {
    return this.buffers.get(soundKey(request));
  }

  /**
   * Renders what the events need and is not there yet, in order of first use.
   * @param onProgress - called with how many of how many are ready
   * @param wanted - asked between sounds; false gives up
   */
  async prepare(
    events: readonly PlayEvent[],
    instruments: ReadonlyMap<string, Instrument>,
    onProgress: (done: number, total: number) => void,
    wanted: () => boolean,
  ): Promise<void> {
    const missing = new Map<string, SoundRequest>();
    for (const event of events) {
      const instrument = instruments.get(event.instrument);
      if (!instrument) continue;
      for (const stroke of event.roll ? [0, 1] : [0]) {
        const request = requestFor(event, stroke, instrument, this.context.sampleRate);
        const key = soundKey(request);
        if (!this.buffers.has(key)) missing.set(key, missing.get(key) ?? request);
      }
    }
    let done = 0;
    for (const [key, request] of missing) {
      if (!wanted()) return;
      const samples = await this.voice(request);
      const buffer = this.context.createBuffer(1, samples.length, request.rate);
      buffer.copyToChannel(samples, 0);
      this.buffers.set(key, buffer);
      done += 1;
      onProgress(done, missing.size);
    }
  }
}
