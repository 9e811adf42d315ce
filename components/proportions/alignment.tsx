'use client';

import { EngineError, type Fraction, type Meeting, formatClock, formatFraction, meetingOf, resultant, secondsOf } from '@/engine';
import { type TypedCycle, readCycles } from '@/lib/client/typed-cycles';
import { readNumber } from '@/lib/client/typed-number';
import { Bars, unitTicks } from './bars';
import { type Answer, Calculator, Typed, workOut } from './calculator';
import { studyOfCycles } from './studies';

const list = (items: readonly string[]): string => (items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`);
const MOST_RESULTANT = 60;

const cycleWords = ({ length, entry, repeats }: TypedCycle): string =>
  `${formatFraction(length)}${entry ? ` from ${formatFraction(entry)}` : ''}${repeats === undefined ? '' : ` ${repeats} times`}`;

/** Two steady pulses that begin together, as one rhythm. */
function resultantNote(cycles: readonly TypedCycle[], pulse: Fraction): string[] {
  const units = cycles.map(({ length }) => length.div(pulse));
  if (units.length !== 2 || cycles.some(({ entry }) => entry !== undefined) || units.some((unit) => unit.compare(1_000) > 0)) return [];
  const gaps = resultant(Number(units[0]!.n), Number(units[1]!.n));
  return [`As steady pulses against each other they give ${gaps.length > MOST_RESULTANT ? `${gaps.slice(0, MOST_RESULTANT).join(' ')} and so on` : gaps.join(' ')}, in units of ${formatFraction(pulse)}.`];
}

function pictureOf(cycles: readonly TypedCycle[], { at, period }: Meeting) {
  const until = at ?? period;
  const bars = cycles.map(({ length, entry, repeats }, index) => {
    const start = entry?.valueOf() ?? 0;
    const whole = until.valueOf() - start;
    const lasts = Math.max(repeats === undefined ? whole : Math.min(whole, repeats * length.valueOf()), 0);
    return { start, length: lasts, label: `cycle ${index + 1}`, ticks: unitTicks(lasts, length.valueOf()) };
  });
  return <Bars bars={bars} {...(at ? { meets: at.valueOf() } : {})} label={`Cycles of ${list(cycles.map(cycleWords))}${at ? ` until they meet after ${at.toFraction(true)}` : ''}`} />;
}

function work(cyclesText: string, speed: string): Answer {
  const cycles = readCycles(cyclesText);
  const perMinute = readNumber(speed);
  const meeting = meetingOf(cycles);
  const { at, turns, period, pulse, states, ended } = meeting;
  const picture = pictureOf(cycles, meeting);
  const common = `In steps of ${formatFraction(pulse)} there are ${formatFraction(states)} states, all of them different, before they begin again together.`;
  if (at === null) return { result: 'never', unit: 'whole notes', failing: 'Entering so, they never begin a turn together.', notes: [`They stand to one another again as they did after ${period.toFraction(true)}.`], picture };
  const seconds = secondsOf(at, { beat: '1/4', perMinute });
  return {
    result: at.toFraction(true),
    unit: `${at.equals(1) ? 'whole note' : 'whole notes'}: ${list(turns.map(formatFraction))} turns; ${formatClock(seconds)}, exactly ${seconds.toFraction(true)} seconds, at quarter = ${speed}`,
    ...(ended === null ? {} : { failing: `Cycle ${ended + 1} has ended by then: it turns ${cycles[ended]!.repeats} times only.` }),
    notes: [common, ...resultantNote(cycles, pulse)],
    picture,
    ...(cycles.every(({ entry }) => entry === undefined) ? { study: () => studyOfCycles(cycles.map(({ length }, index) => ({ length, turns: turns[index]! }))) } : {}),
  };
}

export function AlignmentCalculator({ cycles, speed, set }: { cycles: string; speed: string; set: (change: { cycles?: string; cycleSpeed?: string }) => void }) {
  const answer = workOut(() => work(cycles, speed));
  const isTogether = (() => {
    try {
      return readCycles(cycles).every(({ entry }) => entry === undefined);
    } catch (error) {
      if (error instanceof EngineError) return true;
      throw error;
    }
  })();
  return (
    <Calculator
      heading="Alignment"
      spoken={`Cycles of ${cycles}, ${isTogether ? 'begun together, meet again' : 'meet'} after`}
      answer={answer}
      sentence={
        <>
          Cycles of{' '}
          <Typed
            label="Cycles, in whole notes"
            value={cycles}
            hint="With commas between: 3/4, 5/8 from 1/8, 1 x10. From: when it enters; x: how often it turns."
            onTry={(text) => {
              meetingOf(readCycles(text));
              set({ cycles: text.trim().replace(/\s*[\n\t]+\s*/g, '; ') });
            }}
          />
          {isTogether ? ', begun together at ' : ', at '}
          <Typed
            text={`quarter = ${speed}`}
            label="Quarters a minute of the cycles"
            value={speed}
            onTry={(text) => {
              secondsOf(1, { beat: '1/4', perMinute: readNumber(text) });
              set({ cycleSpeed: text.trim() });
            }}
          />
          {isTogether ? ', meet again after' : ', meet after'}
        </>
      }
    />
  );
}
