'use client';

import { cyclesOf, formatClock, formatFraction, resultant, secondsOf } from '@/engine';
import { readNumber, readNumbers } from '@/lib/client/typed-number';
import { Bars, unitTicks } from './bars';
import { type Answer, Calculator, Typed, workOut } from './calculator';
import { studyOfCycles } from './studies';

const list = (items: readonly string[]): string => (items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`);
const MOST_RESULTANT = 60;

function work(cyclesText: string, speed: string): Answer {
  const lengths = readNumbers(cyclesText);
  const { meet, turns, pulse, states } = cyclesOf(lengths);
  const seconds = secondsOf(meet, { beat: '1/4', perMinute: readNumber(speed) });
  const notes = [`In steps of ${formatFraction(pulse)} there are ${formatFraction(states)} states, all of them different, before they begin again together.`];
  const units = lengths.map((length) => length.div(pulse));
  if (units.length === 2 && units.every((unit) => unit.compare(1_000) <= 0)) {
    const gaps = resultant(Number(units[0]!.n), Number(units[1]!.n));
    notes.push(`As steady pulses against each other they give ${gaps.length > MOST_RESULTANT ? `${gaps.slice(0, MOST_RESULTANT).join(' ')} and so on` : gaps.join(' ')}, in units of ${formatFraction(pulse)}.`);
  }
  return {
    result: meet.toFraction(true),
    unit: `${meet.equals(1) ? 'whole note' : 'whole notes'}: ${list(turns.map(formatFraction))} turns; ${formatClock(seconds)}, exactly ${seconds.toFraction(true)} seconds, at quarter = ${speed}`,
    notes,
    picture: (
      <Bars
        bars={lengths.map((length, index) => ({ length: meet.valueOf(), label: `${formatFraction(turns[index]!)} turns`, ticks: unitTicks(meet.valueOf(), length.valueOf()) }))}
        meets={meet.valueOf()}
        label={`Cycles of ${list(lengths.map(formatFraction))} until they meet after ${meet.toFraction(true)}`}
      />
    ),
    study: () => studyOfCycles(lengths.map((length, index) => ({ length, turns: turns[index]! }))),
  };
}

export function AlignmentCalculator({ cycles, speed, set }: { cycles: string; speed: string; set: (change: { cycles?: string; cycleSpeed?: string }) => void }) {
  const answer = workOut(() => work(cycles, speed));
  return (
    <Calculator
      heading="Alignment"
      spoken={`Cycles of ${cycles}, begun together, meet again after`}
      answer={answer}
      sentence={
        <>
          Cycles of{' '}
          <Typed
            label="Cycles, in whole notes"
            value={cycles}
            hint="With commas between: 3/4, 5/8, 1."
            onTry={(text) => {
              cyclesOf(readNumbers(text));
              set({ cycles: text.trim().replace(/\s*[\n\t]+\s*/g, '; ') });
            }}
          />
          , begun together at{' '}
          <Typed
            text={`quarter = ${speed}`}
            label="Quarters a minute of the cycles"
            value={speed}
            onTry={(text) => {
              secondsOf(1, { beat: '1/4', perMinute: readNumber(text) });
              set({ cycleSpeed: text.trim() });
            }}
          />
          , meet again after
        </>
      }
    />
  );
}
