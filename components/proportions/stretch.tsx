'use client';

import { EngineError, type Fraction, type Metre, formatClock, formatFraction, isFactor, parseMetre, pivotFor, proportionName, secondsOf, stretchedMetre, valueName } from '@/engine';
import { readNumber } from '@/lib/client/typed-number';
import { Bars, unitTicks } from './bars';
import { type Answer, Calculator, Typed, workOut } from './calculator';
import { studyOfLengths } from './studies';

const mixed = (length: Fraction): string => length.toFraction(true);

function metreWords(metre: Metre, factor: Fraction): string {
  try {
    return `in ${stretchedMetre(metre, factor)}, with as many measures`;
  } catch (error) {
    if (error instanceof EngineError) return `not as a metre: ${error.message.replace(/\.$/, '')}`;
    throw error;
  }
}

function tempoWays(factor: Fraction, perMinute: Fraction): string {
  const { before, after } = pivotFor(factor);
  return `as a tempo, ${valueName(before)} = ${valueName(after)}: quarter = ${mixed(perMinute.div(factor))}`;
}

function work(measures: string, metre: string, tempo: string, factorText: string): Answer {
  const length = readNumber(measures);
  const { length: measure, unit } = parseMetre(metre);
  const factor = readNumber(factorText);
  const perMinute = readNumber(tempo);
  if (length.compare(0) <= 0) throw new EngineError('invalid_argument', 'A length must be above 0.');
  if (!isFactor(factor)) throw new EngineError('invalid_factor', `The factor ${formatFraction(factor)} is out of reach. Factors go from 1/1000 to 1000.`);
  const stretched = length.mul(factor);
  const before = secondsOf(length.mul(measure), { beat: '1/4', perMinute });
  const seconds = secondsOf(stretched.mul(measure), { beat: '1/4', perMinute });
  const over = stretched.sub(stretched.floor());
  const name = proportionName(factor);
  return {
    result: `${mixed(length)} × ${formatFraction(factor)} = ${mixed(stretched)}`,
    unit: `${stretched.equals(1) ? 'measure' : 'measures'} of ${metre}`,
    notes: [
      `${mixed(stretched.mul(measure).mul(unit))} beats of 1/${unit}; ${formatClock(before)} becomes ${formatClock(seconds)}, exactly ${mixed(seconds)} seconds.`,
      over.n === 0n ? 'It ends with a measure.' : `It ends ${formatFraction(over)} into a measure, after beat ${mixed(over.mul(measure).mul(unit))}.`,
      ...(name ? [`The proportion is ${name.name}.`] : []),
      `It can be written in longer values; ${tempoWays(factor, perMinute)}; or ${metreWords(metre, factor)}.`,
    ],
    picture: (
      <Bars
        bars={[
          { length: length.valueOf(), label: mixed(length), ticks: unitTicks(length.valueOf()), isQuiet: true },
          { length: stretched.valueOf(), label: mixed(stretched), ticks: unitTicks(length.valueOf()).map((tick) => tick * factor.valueOf()) },
        ]}
        label={`${mixed(length)} measures, and ${mixed(stretched)}`}
      />
    ),
    study: () => studyOfLengths('Stretch', [length, stretched]),
  };
}

type State = { measures: string; metre: string; speed: string; factor: string };

export function StretchCalculator({ set, ...state }: State & { set: (change: Partial<State>) => void }) {
  const { measures, metre, speed, factor } = state;
  const answer = workOut(() => work(measures, metre, speed, factor));
  const number = (field: 'measures' | 'speed' | 'factor') => (text: string) => {
    work(field === 'measures' ? text : measures, metre, field === 'speed' ? text : speed, field === 'factor' ? text : factor);
    set({ [field]: text.trim() });
  };
  return (
    <Calculator
      heading="Stretch"
      spoken={`${measures} measures of ${metre} at quarter = ${speed}, at ${factor} of their length.`}
      answer={answer}
      sentence={
        <>
          <Typed label="Measures" value={measures} onTry={number('measures')} /> measures of{' '}
          <Typed
            label="Metre of the stretch"
            value={metre}
            hint="4/4, 7/8, or with its groups 3+2+2/8."
            onTry={(text) => {
              parseMetre(text.trim());
              set({ metre: text.replace(/\s+/g, '') });
            }}
          />{' '}
          at <Typed text={`quarter = ${speed}`} label="Quarters a minute of the stretch" value={speed} onTry={number('speed')} />, at{' '}
          <Typed label="Factor" value={factor} hint="3/2, 1.5 or 150%." onTry={number('factor')} /> of their length.
        </>
      }
    />
  );
}
