import { type BaseContext, Gain, Panner, type ToneAudioNode, ToneBufferSource, Volume, WaveShaper } from 'tone';
import { PLAYER } from './settings';

/** Nothing leaves louder than half of full scale (−6 dB); up to `CLEAN` it passes unchanged. */
export const CEILING = 0.5;
const CLEAN = 0.4;
/** How far to the side the outer instruments stand, 1 all the way. */
const WIDTH = 0.35;

/** The curve of the ceiling: straight, then bending; input beyond full scale stays at its end. */
export function ceiling(x: number): number {
  const size = Math.abs(x);
  if (size <= CLEAN) return x;
  return Math.sign(x) * (CLEAN + (CEILING - CLEAN) * Math.tanh((size - CLEAN) / (CEILING - CLEAN)));
}

/**
 * What everything goes through: the volume, then the ceiling. The ceiling is a curve and not a compressor, so it looks nothing
 * ahead and delays nothing.
 */
export class MainOut {
  readonly input: Volume;
  private readonly shaper: WaveShaper;

  constructor(
    private readonly context: BaseContext,
    decibels: number,
  ) {
    this.shaper = new WaveShaper({ context, mapping: ceiling, length: 4097 });
    this.shaper.connect(context.destination);
    this.input = new Volume({ context, volume: decibels });
    this.input.connect(this.shaper);
  }

  setVolume(decibels: number): void {
    this.input.volume.linearRampTo(decibels, PLAYER.ramp, this.context.currentTime);
  }

  dispose(): void {
    this.input.dispose();
    this.shaper.dispose();
  }
}

type Sounding = { readonly source: ToneBufferSource; readonly time: number };
type Channel = { readonly gain: Gain; readonly panner: Panner };

/** One run of playing: its instruments' channels, what sounds and what is about to, and the gate that ends it. */
export class Run {
  private readonly gate: Gain;
  private readonly channels = new Map<string, Channel>();
  private readonly sounding = new Set<Sounding>();

  constructor(
    private readonly context: BaseContext,
    output: { readonly input: ToneAudioNode },
    private readonly isAudible: (instrument: string) => boolean,
  ) {
    this.gate = new Gain({ context, gain: 1 });
    this.gate.connect(output.input);
  }

  /** Places the instruments from left to right in their order. */
  addChannels(instruments: readonly string[]): void {
    instruments.forEach((id, index) => {
      if (this.channels.has(id)) return;
      const share = instruments.length > 1 ? index / (instruments.length - 1) : 0.5;
      const gain = new Gain({ context: this.context, gain: this.isAudible(id) ? 1 : 0 });
      const panner = new Panner({ context: this.context, pan: (2 * share - 1) * WIDTH });
      gain.chain(panner, this.gate);
      this.channels.set(id, { gain, panner });
    });
  }

  /**
   * Sounds a buffer at a time of the audio clock, exactly; in the past, at once.
   * @param until - where it is stopped short, within `PLAYER.ramp`; it rings on where nothing is said
   */
  sound(buffer: AudioBuffer, instrument: string, time: number, gain: number, until?: number): void {
    const channel = this.channels.get(instrument);
    if (!channel) return;
    const source = new ToneBufferSource({ context: this.context, url: buffer, fadeIn: 0, fadeOut: until === undefined ? 0 : PLAYER.ramp });
    source.connect(channel.gain);
    const entry = { source, time };
    this.sounding.add(entry);
    source.onended = () => this.sounding.delete(entry);
    source.start(Math.max(time, this.context.currentTime), 0, undefined, gain);
    if (until !== undefined) source.stop(Math.max(until, time));
  }

  /** Takes back what was to begin at or after a time. */
  cancelFrom(time: number): void {
    for (const entry of this.sounding) {
      if (entry.time < time) continue;
      entry.source.dispose();
      this.sounding.delete(entry);
    }
  }

  updateAudible(): void {
    for (const [id, { gain }] of this.channels) gain.gain.linearRampTo(this.isAudible(id) ? 1 : 0, PLAYER.ramp, this.context.currentTime);
  }

  /** Silence within 20 ms; then the nodes are given back. */
  end(): void {
    this.cancelFrom(this.context.currentTime);
    this.gate.gain.linearRampTo(0, PLAYER.ramp, this.context.currentTime);
    // An offline context has run its whole clock before it renders: its nodes are needed until then.
    if (!this.context.isOffline) setTimeout(() => this.dispose(), 5 * PLAYER.ramp * 1000);
  }

  /** Lets what sounds ring on; then the nodes are given back. */
  ringOut(): void {
    if (!this.context.isOffline) setTimeout(() => this.dispose(), (PLAYER.longestSound + 2) * 1000);
  }

  private dispose(): void {
    for (const { source } of this.sounding) source.dispose();
    this.sounding.clear();
    for (const { gain, panner } of this.channels.values()) {
      gain.dispose();
      panner.dispose();
    }
    this.channels.clear();
    this.gate.dispose();
  }
}
