import type { PlayEvent } from '@/engine';

/** Strokes of a roll in a second, whatever the speed. A setting of ours, no source. */
export const STROKES_PER_SECOND = 13;
/** How much weaker the strokes of a roll are after the first, in turn: one hand, the other. Settings of ours. */
const ROLL_GAINS = [0.62, 0.7] as const;
/** A shorter loop is played once: it would be a tone. Seconds; a setting of ours. */
const SHORTEST_LOOP = 0.02;
/** Seconds within which two times are taken for one: far above rounding, far below hearing. */
const SAME = 1e-9;

/** One stroke of a player: an attack, or one of the strokes of a roll. */
export type StrokePlan = {
  /** seconds from the start of the piece at the written tempo */
  readonly seconds: number;
  readonly event: PlayEvent;
  /** 0 for an attack itself, counted on in a roll */
  readonly stroke: number;
  /** to the full sound */
  readonly gain: number;
};

/**
 * Turns events into strokes. Each time is turned from its exact fraction once: nothing is added up along the piece.
 * @param events - in any order
 * @param speed - 1 as written, 0.5 half as fast: rolls keep their 13 strokes in a second of clock time
 * @returns strokes in order of time
 */
export function strokesOf(events: readonly PlayEvent[], speed = 1): StrokePlan[] {
  const strokes: StrokePlan[] = [];
  const between = speed / STROKES_PER_SECOND;
  for (const event of events) {
    const seconds = event.seconds.valueOf();
    strokes.push({ seconds, event, stroke: 0, gain: 1 });
    if (!event.roll) continue;
    // The last stroke keeps half a stroke's distance from the end, so that it is not taken for the next attack.
    const last = Math.floor(event.lasts.valueOf() / between - 0.5 + SAME);
    for (let stroke = 1; stroke <= last; stroke++) {
      strokes.push({ seconds: seconds + stroke * between, event, stroke, gain: ROLL_GAINS[stroke % 2]! });
    }
  }
  return strokes.sort((a, b) => a.seconds - b.seconds);
}

/** When a stroke that falls at a time is stopped short, if its event says so. */
export function dampedAt({ event, seconds }: StrokePlan, time: number, speed: number): number | undefined {
  if (event.ends !== 'choke') return undefined;
  return time + (event.seconds.add(event.lasts).valueOf() - seconds) / speed;
}

/** What is played: a stretch of the piece, once or over and over. Seconds at the written tempo. */
export type Passage = {
  readonly from: number;
  /** strokes at it are no longer played */
  readonly to: number;
  readonly loop: boolean;
};

/** A stroke with its time on the audio clock, in seconds. */
export type TimedStroke = { readonly time: number; readonly plan: StrokePlan };

/** Where playing stood at a moment: the audio clock's seconds and the piece's. */
export type Anchor = { readonly time: number; readonly score: number };

function firstFrom(strokes: readonly StrokePlan[], seconds: number): number {
  let [low, high] = [0, strokes.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (strokes[middle]!.seconds < seconds - SAME) low = middle + 1;
    else high = middle;
  }
  return low;
}

/**
 * One run of playing at one speed. Every time is the anchor's plus one difference: in round n of a loop, a stroke at s comes at
 * `anchor.time + (s − anchor.score + n × (to − from)) / speed`. A change of speed or of the piece begins a new timeline where
 * the old one stood (`anchorAt`).
 */
export class Timeline {
  /** the audio clock's time at which it ends; never where it loops */
  readonly endsAt: number;
  private readonly length: number;
  private readonly first: number;
  private readonly afterLast: number;
  private next: number;
  private round = 0;

  constructor(
    private readonly strokes: readonly StrokePlan[],
    readonly passage: Passage,
    readonly anchor: Anchor,
    readonly speed: number,
  ) {
    this.length = passage.to - passage.from;
    this.first = firstFrom(strokes, passage.from);
    this.afterLast = firstFrom(strokes, passage.to);
    this.next = Math.max(this.first, firstFrom(strokes, anchor.score));
    const endless = passage.loop && this.length >= SHORTEST_LOOP;
    this.endsAt = endless ? Infinity : anchor.time + Math.max(0, passage.to - anchor.score) / speed;
  }

  /** The audio clock's time of a place of the piece, in the given round of the loop. */
  timeOf(seconds: number, round = 0): number {
    return this.anchor.time + (seconds - this.anchor.score + round * this.length) / this.speed;
  }

  /** The place of the piece at a time of the audio clock, in seconds at the written tempo. */
  scoreAt(time: number): number {
    const played = this.anchor.score + Math.max(0, time - this.anchor.time) * this.speed;
    if (played < this.passage.to) return played;
    if (this.endsAt !== Infinity) return Math.max(this.passage.to, this.anchor.score);
    return this.passage.from + ((played - this.passage.from) % this.length);
  }

  /** Where it stands at a time, for the timeline that takes over then. */
  anchorAt(time: number): Anchor {
    return { time: Math.max(time, this.anchor.time), score: this.scoreAt(time) };
  }

  /** The strokes before a time of the audio clock that were not taken yet, in order. */
  take(until: number): TimedStroke[] {
    const taken: TimedStroke[] = [];
    if (this.first >= this.afterLast) return taken;
    for (;;) {
      if (this.next >= this.afterLast) {
        if (this.endsAt !== Infinity) return taken;
        this.round += 1;
        this.next = this.first;
      }
      const plan = this.strokes[this.next]!;
      const time = this.timeOf(plan.seconds, this.round);
      if (time >= until) return taken;
      taken.push({ time, plan });
      this.next += 1;
    }
  }
}
