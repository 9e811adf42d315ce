import { Offline, getContext, Analyser, type BaseContext } from 'tone';
import { type Instrument, buildStudy, clockOf, parseStudy, playEvents } from '../../../engine';
import { demoStudies } from '../../../db/demo';
import { type PlayOptions, PLAYER, StudyPlayer, type Voice } from '../../../lib/client/player';

/** Built by the test into one script, it runs inside the browser: the page's `window.sound`. */

/** Ten samples at full scale: the audio clock's gain may let the first one or two of a source pass as silence. */
const WIDTH = 10;
const impulse: Voice = () => new Float32Array(WIDTH).fill(1);

export type Onset = {
  /** seconds from the start of the rendering, with part of a sample where the first one is weaker */
  readonly time: number;
  /** of full scale */
  readonly level: number;
};

/** Where silence ends. Two impulses are never closer than their width. */
function onsetsOf(samples: Float32Array, rate: number): Onset[] {
  const onsets: Onset[] = [];
  for (let i = 0; i < samples.length; i++) {
    if (Math.abs(samples[i]!) < 1e-5) continue;
    let level = 0;
    for (let j = i; j < i + WIDTH + 2; j++) level = Math.max(level, Math.abs(samples[j] ?? 0));
    onsets.push({ time: i / rate, level });
    i += WIDTH + 2;
  }
  return onsets;
}

function demo(slug: string) {
  const found = demoStudies.find((one) => one.slug === slug);
  if (!found) throw new Error(`There is no demo ${slug}.`);
  const study = parseStudy(found.study);
  const built = buildStudy(study);
  return { instruments: study.instruments, events: playEvents(study, built), duration: clockOf(study, built).total.valueOf() };
}

type Rendering = {
  readonly slug: string;
  /** the only one heard; all where none is named */
  readonly instrument?: string;
  readonly rate: number;
  readonly speed?: number;
  readonly options?: PlayOptions;
  /** seconds to render */
  readonly seconds?: number;
  /** real sounds where true, impulses where not */
  readonly real?: boolean;
  readonly volume?: number;
  /** something done while it plays, at the first tick after so many seconds */
  readonly change?: { readonly after: number; readonly what: 'half speed' | 'reload' };
};

/** The player itself on Tone's offline clock. */
async function render({ slug, instrument, rate, speed = 1, options = { from: 0 }, seconds, real = false, volume, change }: Rendering) {
  const { instruments, events, duration } = demo(slug);
  let player: StudyPlayer | null = null;
  const begin = async (context: BaseContext): Promise<void> => {
    player = new StudyPlayer({ context, volume, ...(real ? {} : { voice: impulse }) });
    await player.load(events, instruments, duration);
    player.setSpeed(speed);
    if (instrument !== undefined) player.setSolo([instrument]);
    await player.play(options);
    const onTick = (): void => {
      if (!change || changedAt !== null || context.currentTime < change.after) return;
      changedAt = context.currentTime;
      if (change.what === 'half speed') player?.setSpeed(speed / 2);
      else void player?.load([...events], instruments, duration);
    };
    context.on('tick', onTick);
  };
  let changedAt: number | null = null;
  const began = performance.now();
  const buffer = await Offline(begin, seconds ?? duration / speed + PLAYER.lead + 1, 1, rate);
  const samples = buffer.getChannelData(0);
  let peak = 0;
  for (const sample of samples) peak = Math.max(peak, Math.abs(sample));
  const state = (player as StudyPlayer | null)?.state;
  return { onsets: real ? [] : onsetsOf(samples, rate), peak, milliseconds: performance.now() - began, missed: state?.missed, status: state?.status, lead: PLAYER.lead, changedAt };
}

/** A real sound through the whole chain: seconds from its stroke's time to the first sample above a tenth of its peak. */
async function onsetThroughChain(instrument: Instrument, rate: number): Promise<number> {
  const { events } = demo(demoStudies[0]!.slug);
  const event = { ...events[0]!, instrument: instrument.id, accent: undefined, roll: undefined, sound: 1 };
  const begin = async (context: BaseContext): Promise<void> => {
    const player = new StudyPlayer({ context });
    await player.load([{ ...event, seconds: event.seconds.mul(0) }], [instrument], 1);
    await player.play({ from: 0 });
  };
  const samples = (await Offline(begin, 0.5, 1, rate)).getChannelData(0);
  let peak = 0;
  for (const sample of samples) peak = Math.max(peak, Math.abs(sample));
  return samples.findIndex((sample) => Math.abs(sample) > peak / 10) / rate - PLAYER.lead;
}

/** The player in real time, with an ear at the end of the chain. */
async function live(slug: string) {
  const { instruments, events, duration } = demo(slug);
  const player = new StudyPlayer();
  await player.load(events, instruments, duration);
  const ear = new Analyser({ type: 'waveform', size: 512 });
  getContext().destination.input.connect(ear.input);
  const loudness = (): number => {
    const wave = ear.getValue();
    return wave instanceof Float32Array ? wave.reduce((most, x) => Math.max(most, Math.abs(x)), 0) : 0;
  };
  const suspend = async (): Promise<void> => {
    const { rawContext } = getContext();
    if ('suspend' in rawContext && 'close' in rawContext) await rawContext.suspend();
  };
  return { player, loudness, suspend, clock: () => getContext().currentTime, events, instruments, duration };
}

declare global {
  interface Window {
    sound: { render: typeof render; onsetThroughChain: typeof onsetThroughChain; live: typeof live };
  }
}

window.sound = { render, onsetThroughChain, live };
