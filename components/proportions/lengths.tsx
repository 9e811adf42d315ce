'use client';

import { type Fraction, checkLadder, formatFraction, ladder, proportionName } from '@/engine';
import { readNumber, readNumbers } from '@/lib/client/typed-number';
import { Bars, unitTicks } from './bars';
import { type Answer, Calculator, Typed, workOut } from './calculator';
import { studyOfLengths } from './studies';

const mixed = (length: Fraction): string => length.toFraction(true);
const CLAIMS: Readonly<Record<string, string>> = { '3/2': 'half as long again', '4/3': 'a third as long again', '5/4': 'a quarter as long again', '2': 'twice as long', '1/2': 'half as long', '2/3': 'two thirds as long' };
export const claimText = (ratio: Fraction): string => CLAIMS[formatFraction(ratio)] ?? `${formatFraction(ratio)} times as long`;
const ORDINALS = ['first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh', 'eighth', 'ninth', 'tenth'];

function named(step: Fraction): string {
  const found = proportionName(step);
  return found ? `${formatFraction(step)} (${found.name})` : formatFraction(step);
}

function work(lengthsText: string, claim: string): Answer {
  const lengths = readNumbers(lengthsText);
  const { toFirst, steps, total } = ladder(lengths);
  const ratio = readNumber(claim);
  const checked = checkLadder(lengths, ratio);
  const step = checked.failure?.step ?? -1;
  const notes = [
    ...(steps.length > 0 ? [`The steps are ${steps.map(named).join(', ')}.`, `To the first: ${toFirst.map(formatFraction).join(', ')}.`] : []),
    ...(checked.holds ? [] : [`${claimText(ratio).replace(/^./, (letter) => letter.toUpperCase())} each time would be ${checked.run.map(mixed).join(', ')}.`]),
    ...(checked.holds && steps.length > 0 ? [`Yes: each is ${claimText(ratio)}.`] : []),
  ];
  const bars = lengths.map((length, index) => ({
    length: length.valueOf(),
    label: mixed(length),
    ticks: unitTicks(length.valueOf()),
    isWrong: index === step + 1 && step >= 0,
    ...(!checked.holds && index > step ? { wanted: checked.run[index]!.valueOf() } : {}),
  }));
  return {
    result: lengths.length > 1 ? `${lengths.map(mixed).join(' + ')} = ${mixed(total)}` : mixed(total),
    unit: 'measures',
    ...(checked.failure ? { failing: `No: the ${ORDINALS[step] ?? `${step + 1}th`} step is ${formatFraction(checked.failure.ratio)}.` } : {}),
    notes,
    picture: <Bars bars={bars} label={`Lengths of ${lengths.map(mixed).join(', ')} measures, to scale`} />,
    study: () => studyOfLengths('Lengths', lengths),
  };
}

export function LengthsCalculator({ lengths, claim, set }: { lengths: string; claim: string; set: (change: { lengths?: string; claim?: string }) => void }) {
  const answer = workOut(() => work(lengths, claim));
  const words = (() => {
    try {
      return claimText(readNumber(claim));
    } catch {
      return claim;
    }
  })();
  return (
    <Calculator
      heading="Lengths"
      spoken={`Lengths of ${lengths} measures. Is each ${words}?`}
      answer={answer}
      sentence={
        <>
          Lengths of{' '}
          <Typed
            label="Lengths, in measures"
            value={lengths}
            hint="With commas between. By a ratio: 5 by 3/2 x4. By ratios: 4 by 3/2, 4/3."
            onTry={(text) => set({ lengths: expand(text) })}
          />{' '}
          measures. Is each{' '}
          <Typed
            text={words}
            label="Claim: each to the one before"
            value={claim}
            hint="A number: 3/2 is half as long again."
            onTry={(text) => {
              checkLadder(['1', '1'], readNumber(text));
              set({ claim: text.trim() });
            }}
          />
          ?
        </>
      }
    />
  );
}

/** Lengths as typed, or worked out: `5 by 3/2 x4` is four lengths, `4 by 3/2, 4/3` three. @throws EngineError */
export function expand(text: string): string {
  const by = /^(.+?)\s+by\s+(.+?)(?:\s*[x×]\s*(\d{1,3}))?$/i.exec(text.trim());
  if (!by) {
    readNumbers(text);
    return text.trim().replace(/\s*[\n\t]+\s*/g, '; ');
  }
  const [, first = '', ratiosText = '', times] = by;
  const run = [readNumber(first)];
  const ratios = readNumbers(ratiosText);
  const count = times === undefined ? ratios.length + 1 : Number(times);
  while (run.length < count) run.push(run.at(-1)!.mul(ratios[(run.length - 1) % ratios.length]!));
  ladder(run);
  return run.map(mixed).join(', ');
}
