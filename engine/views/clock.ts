import { Fraction, ZERO } from '../exact/fraction';
import { secondsOfWhole } from '../rhythm/tempo';
import type { Study } from '../study/schema';
import { type Extent, tempoOf } from './measures';

export type ClockSpan = {
  /** in whole notes, from the study's start */
  readonly start: Fraction;
  readonly length: Fraction;
  /** exact seconds at its start */
  readonly seconds: Fraction;
  /** exact seconds of one whole note */
  readonly secondsOfWhole: Fraction;
};

export type Clock = {
  readonly spans: readonly ClockSpan[];
  /** exact seconds of the whole study */
  readonly total: Fraction;
  /** exact seconds at a position */
  secondsAt(position: Fraction): Fraction;
};

/** The tempo of each section turned into exact seconds. */
export function clockOf(study: Study, built: Extent): Clock {
  const spans: ClockSpan[] = [];
  let seconds = ZERO;
  study.sections.forEach((section, index) => {
    const { start, length } = built.sections[index]!;
    const whole = secondsOfWhole(tempoOf(study, section));
    spans.push({ start, length, seconds, secondsOfWhole: whole });
    seconds = seconds.add(length.mul(whole));
  });
  const last = spans.at(-1);
  return {
    spans,
    total: seconds,
    secondsAt(position) {
      const span = spans.findLast((one) => one.start.compare(position) <= 0) ?? last;
      return span === undefined ? ZERO : span.seconds.add(position.sub(span.start).mul(span.secondsOfWhole));
    },
  };
}

/** Clock time in words, rounded to the second: `3′40″`. */
export function formatClock(seconds: Fraction): string {
  const whole = seconds.round().n;
  return `${whole / 60n}′${String(whole % 60n).padStart(2, '0')}″`;
}

/** Clock time for a screen reader: `3 minutes 40 seconds`. */
export function spokenClock(seconds: Fraction): string {
  const whole = seconds.round().n;
  const word = (n: bigint, unit: string) => `${n} ${unit}${n === 1n ? '' : 's'}`;
  const minutes = whole / 60n;
  const rest = whole % 60n;
  if (minutes === 0n) return word(rest, 'second');
  return rest === 0n ? word(minutes, 'minute') : `${word(minutes, 'minute')} ${word(rest, 'second')}`;
}
