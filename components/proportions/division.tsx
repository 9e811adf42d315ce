'use client';

import { EngineError, type Fraction, divide, fibonacci, formatFraction, goldenSection, roundParts } from '@/engine';
import { readNumber, readNumbers } from '@/lib/client/typed-number';
import { Choices } from '../study/choices';
import { Token } from '../ui/token';
import { Bars, unitTicks } from './bars';
import { type Answer, Calculator, Typed, workOut } from './calculator';
import { studyOfLengths } from './studies';

export const WAYS = { ratios: 'in the ratio of', golden: 'by the golden section', fibonacci: 'by Fibonacci numbers, so many', evenly: 'evenly, into' } as const;
export type Way = keyof typeof WAYS;
const mixed = (length: Fraction): string => length.toFraction(true);

function count(text: string, most: number): number {
  const number = readNumber(text);
  if (number.d !== 1n || number.compare(1) < 0 || number.compare(most) > 0) throw new EngineError('invalid_argument', `Write a whole number from 1 to ${most}.`);
  return Number(number.n);
}

function sharesOf(way: Exclude<Way, 'golden'>, shares: string): Fraction[] {
  if (way === 'evenly') return Array.from({ length: count(shares, 200) }, () => readNumber('1'));
  return way === 'fibonacci' ? fibonacci(count(shares, 40)) : readNumbers(shares);
}

/** The golden section is no fraction: it is found to the nearest unit, in whole numbers. */
function golden(whole: Fraction, unit: Fraction): Answer {
  const units = whole.div(unit);
  if (units.d !== 1n) throw new EngineError('invalid_argument', `${mixed(whole)} is no whole number of units of ${formatFraction(unit)}: choose another unit.`);
  const long = unit.mul(goldenSection(Number(units.n)));
  const parts = [long, whole.sub(long)];
  return {
    result: `${parts.map(mixed).join(' + ')} = ${mixed(whole)}`,
    unit: 'measures',
    notes: [`To the nearest ${formatFraction(unit)}; measure ${mixed(long.floor().add(1))} begins the shorter part, or holds the section. The section itself, 0.618… of the whole, is no fraction.`],
    picture: <Bars bars={parts.map((part, index) => ({ start: index === 0 ? 0 : long.valueOf(), length: part.valueOf(), label: mixed(part), ticks: unitTicks(part.valueOf()) }))} label={`${mixed(whole)} as ${parts.map(mixed).join(' and ')}`} />,
    study: () => studyOfLengths('Golden section', parts),
  };
}

function work(wholeText: string, way: Way, shares: string, unitText: string): Answer {
  const whole = readNumber(wholeText);
  const unit = readNumber(unitText);
  if (whole.compare(0) <= 0 || unit.compare(0) <= 0) throw new EngineError('invalid_argument', 'The whole and the unit must be above 0.');
  if (way === 'golden') return golden(whole, unit);
  const parts = divide(whole, sharesOf(way, shares));
  const rounded = roundParts(parts, unit);
  const isExact = rounded.every(({ error }) => error.n === 0n);
  let start = 0;
  const bars = rounded.map(({ exact, rounded: near }) => {
    const bar = { start, length: near.valueOf(), label: mixed(near), ticks: unitTicks(near.valueOf()), isQuiet: false, exact };
    start += near.valueOf();
    return bar;
  });
  const errors = rounded.map(({ exact, error }) => (error.n === 0n ? mixed(exact) : `${mixed(exact)} (${error.s > 0n ? '+' : '−'}${formatFraction(error.abs())})`));
  return {
    result: `${rounded.map(({ rounded: near }) => mixed(near)).join(' + ')} = ${mixed(rounded.reduce((sum, { rounded: near }) => sum.add(near), readNumber('0')))}`,
    unit: 'measures',
    notes: [isExact ? 'Every part is exact.' : `Exactly, with what the rounding to ${formatFraction(unit)} adds or takes: ${errors.join(', ')}. The sum is kept.`],
    picture: <Bars bars={bars} label={`${mixed(whole)} divided: ${rounded.map(({ rounded: near }) => mixed(near)).join(', ')}`} />,
    study: () => studyOfLengths('Division', rounded.map(({ rounded: near }) => near).filter((near) => near.n !== 0n)),
  };
}

type State = { whole: string; way: Way; shares: string; unit: string };

export function DivisionCalculator({ set, ...state }: State & { set: (change: Partial<State>) => void }) {
  const { whole, way, shares, unit } = state;
  const answer = workOut(() => work(whole, way, shares, unit));
  const field = (name: 'whole' | 'shares' | 'unit') => (text: string) => {
    work(name === 'whole' ? text : whole, way, name === 'shares' ? text : shares, name === 'unit' ? text : unit);
    set({ [name]: text.trim().replace(/\s*[\n\t]+\s*/g, '; ') });
  };
  const begins: Record<Way, string> = { ratios: '1, 2, 3', golden: shares, fibonacci: '5', evenly: '4' };
  return (
    <Calculator
      heading="Division"
      spoken={`${whole} measures divided ${WAYS[way]} ${way === 'golden' ? '' : shares}, to the nearest ${unit}.`}
      answer={answer}
      sentence={
        <>
          <Typed label="The whole, in measures" value={whole} onTry={field('whole')} /> measures divided{' '}
          <Token text={WAYS[way]} label="How it is divided">
            {() => (
              <Choices
                name="How it is divided"
                value={way}
                options={Object.entries(WAYS) as [Way, string][]}
                onTry={(next) => {
                  set({ way: next, shares: begins[next] });
                  return null;
                }}
              />
            )}
          </Token>
          {way !== 'golden' && (
            <>
              {' '}
              <Typed label={way === 'ratios' ? 'Ratios' : way === 'fibonacci' ? 'How many Fibonacci numbers' : 'How many parts'} value={shares} onTry={field('shares')} />
            </>
          )}
          {way === 'evenly' && ' parts'}, to the nearest <Typed label="Unit of rounding, in measures" value={unit} hint="1 is a measure, 1/4 a beat of 4/4." onTry={field('unit')} />.
        </>
      }
    />
  );
}
