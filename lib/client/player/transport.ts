import type { BaseContext } from 'tone';
import type { Instrument } from '@/engine';
import { type SoundBank, requestFor } from './bank';
import { outputLatency } from './latency';
import { type MainOut, Run } from './mixer';
import { type Anchor, type Passage, type StrokePlan, Timeline, dampedAt } from './schedule';
import { PLAYER } from './settings';

/** What is to be played and how fast. */
export type Course = {
  /** for this speed, in order of time */
  readonly strokes: readonly StrokePlan[];
  readonly instruments: ReadonlyMap<string, Instrument>;
  readonly passage: Passage;
  readonly speed: number;
};

type Hooks = {
  readonly isAudible: (instrument: string) => boolean;
  /** so many strokes were left out because they came too late */
  readonly onMissed: (strokes: number) => void;
  readonly onFinished: () => void;
};

/** Runs a course against the audio clock: hands strokes over ahead of time, changes course, tells the place. */
export class Transport {
  private run: Run | null = null;
  private course: Course | null = null;
  /** the running timeline last; those before it tell the place until the sound catches up */
  private timelines: Timeline[] = [];

  constructor(
    private readonly context: BaseContext,
    private readonly bank: SoundBank,
    private readonly out: MainOut,
    private readonly hooks: Hooks,
  ) {
    context.on('tick', this.tick);
  }

  begin(course: Course, score: number): void {
    this.end();
    this.course = course;
    this.run = new Run(this.context, this.out, this.hooks.isAudible);
    this.run.addChannels([...course.instruments.keys()]);
    this.timelines = [timelineFrom(course, { time: this.context.currentTime + PLAYER.lead, score })];
    this.tick();
  }

  /** Takes back what has not begun and goes on, at the same place, on the new course. Nothing where nothing plays. */
  change(course: Course): void {
    const current = this.timelines.at(-1);
    if (!this.run || !current) return;
    const { currentTime } = this.context;
    const anchor = current.anchorAt(currentTime + PLAYER.changeAhead);
    this.schedule(current, anchor.time);
    this.run.cancelFrom(anchor.time);
    this.course = course;
    this.run.addChannels([...course.instruments.keys()]);
    const past = this.timelines.filter((timeline) => timeline === current || timeline.anchor.time > currentTime - 2);
    this.timelines = [...past, timelineFrom(course, anchor)];
    this.tick();
  }

  /** Silence within `PLAYER.ramp`. */
  end(): void {
    this.run?.end();
    this.forget();
  }

  /** The place that is heard now, in seconds at the written tempo; null where nothing plays. */
  position(): number | null {
    const heard = this.context.currentTime - outputLatency(this.context);
    const timeline = this.timelines.findLast((one) => one.anchor.time <= heard) ?? this.timelines[0];
    return timeline?.scoreAt(heard) ?? null;
  }

  updateAudible(): void {
    this.run?.updateAudible();
  }

  dispose(): void {
    this.context.off('tick', this.tick);
    this.end();
  }

  /** On each tick of Tone's clock, which a worker drives: it goes on in a background tab. */
  private readonly tick = (): void => {
    const timeline = this.timelines.at(-1);
    if (!timeline) return;
    this.schedule(timeline, this.context.currentTime + PLAYER.lookAhead);
    if (this.context.currentTime - outputLatency(this.context) < timeline.endsAt) return;
    this.run?.ringOut();
    this.forget();
    this.hooks.onFinished();
  };

  private schedule(timeline: Timeline, until: number): void {
    const { context, course, run } = this;
    if (!course || !run) return;
    const earliest = context.currentTime - PLAYER.tooLate;
    let missed = 0;
    for (const { time, plan } of timeline.take(until)) {
      const instrument = course.instruments.get(plan.event.instrument);
      const buffer = instrument && this.bank.get(requestFor(plan.event, plan.stroke, instrument, context.sampleRate));
      if (!buffer) continue;
      if (time < earliest) missed += 1;
      else run.sound(buffer, plan.event.instrument, time, plan.gain, dampedAt(plan, time, timeline.speed));
    }
    if (missed > 0) this.hooks.onMissed(missed);
  }

  private forget(): void {
    this.run = null;
    this.course = null;
    this.timelines = [];
  }
}

/** A place outside of the passage goes to its beginning. */
function timelineFrom({ strokes, passage, speed }: Course, anchor: Anchor): Timeline {
  const inside = anchor.score >= passage.from && anchor.score <= passage.to;
  return new Timeline(strokes, passage, inside ? anchor : { ...anchor, score: passage.from }, speed);
}
