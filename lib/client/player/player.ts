import { type BaseContext, getContext } from 'tone';
import type { Fraction, Instrument, PlayEvent } from '@/engine';
import { SoundBank, type Voice } from './bank';
import { outputLatency } from './latency';
import { MainOut } from './mixer';
import { type StrokePlan, strokesOf } from './schedule';
import { PLAYER } from './settings';
import { type PlayerState, Store } from './store';
import { type Course, Transport } from './transport';

export type PlayerOptions = {
  /** Tone's own by default */
  readonly context?: BaseContext;
  /** synthesised percussion by default */
  readonly voice?: Voice;
  /** decibels */
  readonly volume?: number;
};

/** A place of the piece in seconds at the written tempo, exact where it is known so. */
export type Place = Fraction | number;

export type PlayOptions = {
  /** where to begin; where it was paused, else the start */
  readonly from?: Place;
  /** where to end; the end of the piece */
  readonly to?: Place;
  /** over and over, from `from` */
  readonly loop?: boolean;
};

type Graph = { readonly context: BaseContext; readonly bank: SoundBank; readonly out: MainOut; readonly transport: Transport };

const clamp = (value: number, low: number, high: number): number => Math.min(high, Math.max(low, value));

/**
 * Plays the events of a study. It may be made anywhere: audio nodes are made on the first start only, which must come out of a
 * click or a key. Times are seconds at the written tempo; sounds come `PLAYER.lead` after the call, then exactly on time.
 */
export class StudyPlayer {
  private readonly store: Store<PlayerState>;
  private graph: Graph | null = null;
  private events: readonly PlayEvent[] = [];
  private instruments: ReadonlyMap<string, Instrument> = new Map();
  private duration = 0;
  private strokes: readonly StrokePlan[] | null = null;
  private wishes: { from: number; to: number | null } = { from: 0, to: null };
  private place = 0;
  /** grows with every command, so that one that waited knows when it is no longer wanted */
  private command = 0;
  private loading = 0;

  constructor(private readonly options: PlayerOptions = {}) {
    this.store = new Store<PlayerState>({
      status: 'stopped',
      speed: 1,
      volume: clamp(options.volume ?? PLAYER.startVolume, PLAYER.quietest, 0),
      solo: [],
      muted: [],
      loop: false,
      preparing: null,
      prepareMilliseconds: null,
      missed: 0,
      problem: null,
    });
  }

  get state(): PlayerState {
    return this.store.get();
  }

  /** The same as `state`, bound, for `useSyncExternalStore`. */
  readonly getState = (): PlayerState => this.store.get();

  /** @returns ends the subscription */
  readonly onStateChange = (listener: () => void): (() => void) => this.store.subscribe(listener);

  /** Seconds: `lead` from `play` to sound, `chain` in our own nodes, `output` from the audio clock to the ear. */
  get latency(): { lead: number; chain: number; output: number } {
    return { lead: PLAYER.lead, chain: 0, output: this.graph ? outputLatency(this.graph.context) : 0 };
  }

  /**
   * Makes the audio nodes and asks the browser for sound. Call it, or `play`, straight from a click.
   * @returns whether sound is on; where not, `state.problem` says so
   */
  async start(): Promise<boolean> {
    const { context } = this.ensureGraph();
    if (context.isOffline || context.state === 'running') return true;
    const patience = new Promise<void>((resolve) => setTimeout(resolve, PLAYER.patience * 1000));
    await Promise.race([context.resume().catch(() => undefined), patience]);
    const running = (context.state as string) === 'running';
    this.store.set({ problem: running ? null : 'The browser does not let sound begin. Press play again, and check that a sound output is connected.' });
    return running;
  }

  /**
   * Takes a piece, or its next version: while it plays, playing goes on at the same place once the new sounds are ready.
   * @param duration - of the whole piece, seconds
   */
  async load(events: readonly PlayEvent[], instruments: readonly Instrument[], duration: Place): Promise<void> {
    const loading = ++this.loading;
    const byId = new Map(instruments.map((instrument) => [instrument.id, instrument]));
    if (this.state.status === 'playing') await this.prepare(events, byId, () => loading === this.loading);
    if (loading !== this.loading) return;
    this.events = events;
    this.instruments = byId;
    this.duration = Number(duration);
    this.strokes = null;
    this.place = clamp(this.place, 0, this.duration);
    this.changeCourse();
  }

  /**
   * Begins to play; from a click. Without options it goes on from where it was paused, in the same passage.
   * Resolves when it plays, or when it does not after all: `state` tells.
   */
  async play(options?: PlayOptions): Promise<void> {
    const here = this.position();
    const command = this.halt();
    let { loop } = this.state;
    if (options || this.state.status !== 'paused') {
      const { from = here >= this.duration ? 0 : here, to } = options ?? {};
      this.wishes = { from: clamp(Number(from), 0, this.duration), to: to === undefined ? null : Number(to) };
      this.place = this.wishes.from;
      loop = options?.loop ?? false;
    }
    this.store.set({ status: 'preparing', loop, missed: 0, problem: null });
    const wanted = (): boolean => command === this.command;
    const on = await this.start();
    if (on) await this.prepareAll(wanted);
    if (!wanted()) return;
    if (on) this.begin();
    else this.store.set({ status: 'stopped' });
  }

  /** Silence; the place is kept, and `play()` goes on from it. */
  pause(): void {
    if (this.state.status !== 'playing' && this.state.status !== 'preparing') return;
    this.place = this.position();
    this.halt();
    this.store.set({ status: 'paused', preparing: null });
  }

  /** Silence; the place goes back to where playing began. */
  stop(): void {
    this.halt();
    this.place = this.wishes.from;
    this.store.set({ status: 'stopped', preparing: null });
  }

  /** Moves the place; while playing, playing goes on from there. A place outside of the passage leaves the passage. */
  seek(seconds: Place): void {
    const to = clamp(Number(seconds), 0, this.duration);
    const { status } = this.state;
    this.place = to;
    if (to < this.wishes.from || to >= (this.wishes.to ?? Infinity)) {
      this.wishes = { from: to, to: null };
      this.store.set({ loop: false });
    }
    if (status !== 'playing') return;
    this.halt();
    this.begin();
  }

  /** Changes what is played without a break; where the place is outside of it, playing goes on at its beginning. */
  setPassage({ from = 0, to, loop = false }: PlayOptions): void {
    this.wishes = { from: clamp(Number(from), 0, this.duration), to: to === undefined ? null : Number(to) };
    this.store.set({ loop });
    this.changeCourse();
  }

  /** @param factor - 1 as written, 0.5 half as fast; takes effect within 20 ms, at the same place */
  setSpeed(factor: number): void {
    if (!Number.isFinite(factor)) return;
    this.store.set({ speed: clamp(factor, PLAYER.slowest, PLAYER.fastest) });
    this.strokes = null;
    this.changeCourse();
  }

  /** @param decibels - −60 to 0 */
  setVolume(decibels: number): void {
    if (Number.isNaN(decibels)) return;
    this.store.set({ volume: clamp(decibels, PLAYER.quietest, 0) });
    this.graph?.out.setVolume(this.state.volume);
  }

  /** Only these are heard; an empty list lets all be heard. */
  setSolo(ids: readonly string[]): void {
    this.store.set({ solo: [...ids] });
    this.graph?.transport.updateAudible();
  }

  setMuted(ids: readonly string[]): void {
    this.store.set({ muted: [...ids] });
    this.graph?.transport.updateAudible();
  }

  /** The place that is heard now, in seconds at the written tempo. */
  position(): number {
    return this.graph?.transport.position() ?? this.place;
  }

  dispose(): void {
    this.halt();
    this.loading += 1;
    if (!this.graph) return;
    const { context, out, transport } = this.graph;
    context.off('statechange', this.contextChanged);
    transport.dispose();
    setTimeout(() => out.dispose(), 10 * PLAYER.ramp * 1000);
    this.graph = null;
    this.store.set({ status: 'stopped', preparing: null });
  }

  private ensureGraph(): Graph {
    if (this.graph) return this.graph;
    const context = this.options.context ?? getContext();
    const bank = new SoundBank(context, this.options.voice);
    const out = new MainOut(context, this.state.volume);
    const transport = new Transport(context, bank, out, {
      isAudible: (id) => !this.state.muted.includes(id) && (this.state.solo.length === 0 || this.state.solo.includes(id)),
      onMissed: (strokes) => this.store.set({ missed: this.state.missed + strokes }),
      onFinished: this.finished,
    });
    this.graph = { context, bank, out, transport };
    context.on('statechange', this.contextChanged);
    return this.graph;
  }

  /** A call, a headset or another program may take the sound away: the place is kept for the next `play`. */
  private readonly contextChanged = (): void => {
    if (this.graph && !this.graph.context.isOffline && this.graph.context.state !== 'running') this.pause();
  };

  private course(): Course {
    const { from, to } = this.wishes;
    const { loop, speed } = this.state;
    const end = clamp(to ?? this.duration, from, this.duration);
    this.strokes ??= strokesOf(this.events, speed);
    return { strokes: this.strokes, instruments: this.instruments, passage: { from: Math.min(from, end), to: end, loop }, speed };
  }

  private async prepareAll(wanted: () => boolean): Promise<void> {
    // The piece may change while its sounds are made.
    for (let events: readonly PlayEvent[] | null = null; wanted() && events !== this.events; ) {
      events = this.events;
      await this.prepare(events, this.instruments, wanted);
    }
  }

  private async prepare(events: readonly PlayEvent[], instruments: ReadonlyMap<string, Instrument>, wanted: () => boolean): Promise<void> {
    const began = performance.now();
    let made = false;
    const onProgress = (done: number, total: number): void => {
      made = true;
      if (wanted()) this.store.set({ preparing: { done, total } });
    };
    await this.ensureGraph().bank.prepare(events, instruments, onProgress, wanted);
    if (!wanted()) return;
    if (made) this.store.set({ prepareMilliseconds: performance.now() - began });
    if (this.state.preparing) this.store.set({ preparing: null });
  }

  private begin(): void {
    this.ensureGraph().transport.begin(this.course(), this.place);
    this.store.set({ status: 'playing' });
  }

  private changeCourse(): void {
    if (this.state.status === 'playing') this.graph?.transport.change(this.course());
  }

  /** The end of the passage: what sounds rings on, the place goes back to where playing began. */
  private readonly finished = (): void => {
    this.command += 1;
    this.place = this.wishes.from;
    this.store.set({ status: 'stopped' });
  };

  /** Ends the run, if any, and whatever waits. @returns the number of the new command */
  private halt(): number {
    this.graph?.transport.end();
    return ++this.command;
  }
}
