'use client';

import { type Fraction, canonEntries, formatFraction } from '@/engine';
import { readNumber, readNumbers } from '@/lib/client/typed-number';
import { Choices } from '../study/choices';
import { Token } from '../ui/token';
import { Bars, unitTicks } from './bars';
import { type Answer, Calculator, Typed, workOut } from './calculator';
import { withProcess } from './studies';

export const MEETINGS = { '1': 'end together', '1/2': 'meet in the middle', '0': 'begin together' } as const;
export type Meeting = keyof typeof MEETINGS;
const mixed = (length: Fraction): string => length.toFraction(true);

function work(subject: string, speedsText: string, meet: Meeting): Answer {
  const length = readNumber(subject);
  const speeds = readNumbers(speedsText);
  const voices = canonEntries(length, speeds, meet);
  const whole = voices.reduce((latest, { end }) => (end.compare(latest) > 0 ? end : latest), voices[0]!.end);
  return {
    result: voices.map(({ delay }) => mixed(delay)).join(', '),
    unit: 'measures until each enters',
    notes: [
      `They last ${voices.map(({ length: own }) => mixed(own)).join(', ')} measures and end after ${voices.map(({ end }) => mixed(end)).join(', ')}.`,
      `As parts of the whole they enter at ${voices.map(({ delay }) => formatFraction(delay.div(whole))).join(', ')}.`,
    ],
    picture: (
      <Bars
        bars={voices.map(({ delay, length: own, speed }) => ({ start: delay.valueOf(), length: own.valueOf(), label: `speed ${formatFraction(speed)}`, ticks: unitTicks(length.valueOf()).map((tick) => (tick * own.valueOf()) / length.valueOf()) }))}
        label={`Voices at speeds ${speeds.map(formatFraction).join(', ')} that ${MEETINGS[meet]}`}
      />
    ),
    ...(meet === '1/2'
      ? {}
      : {
          study: () =>
            withProcess(
              'Canon',
              { kind: 'proportion', factors: voices.map(({ length: own }) => formatFraction(own.div(2))), entries: meet === '1' ? 'ending-together' : 'together' },
              { instruments: voices.map((_, index) => `voice-${index + 1}`) },
              { instruments: voices.map((_, index) => ({ id: `voice-${index + 1}`, name: `Voice ${index + 1}`, family: (['wood', 'skin', 'metal', 'found'] as const)[index % 4]! })) },
            ),
        }),
  };
}

export function CanonCalculator({ subject, speeds, meet, set }: { subject: string; speeds: string; meet: Meeting; set: (change: { subject?: string; speeds?: string; meet?: Meeting }) => void }) {
  const answer = workOut(() => work(subject, speeds, meet));
  return (
    <Calculator
      heading="Canon"
      spoken={`A subject of ${subject} measures at speeds of ${speeds}: the voices ${MEETINGS[meet]}.`}
      answer={answer}
      sentence={
        <>
          A subject of{' '}
          <Typed
            label="Measures of the subject"
            value={subject}
            onTry={(text) => {
              canonEntries(readNumber(text), ['1']);
              set({ subject: text.trim() });
            }}
          />{' '}
          measures, in voices at speeds of{' '}
          <Typed
            label="Speeds"
            value={speeds}
            hint="With commas between; at speed 2 it lasts half as long."
            onTry={(text) => {
              canonEntries('1', readNumbers(text));
              set({ speeds: text.trim().replace(/\s*[\n\t]+\s*/g, '; ') });
            }}
          />
          , which are to{' '}
          <Token text={MEETINGS[meet]} label="Where they meet">
            {() => (
              <Choices
                name="Where they meet"
                value={meet}
                options={Object.entries(MEETINGS) as [Meeting, string][]}
                onTry={(next) => {
                  set({ meet: next });
                  return null;
                }}
              />
            )}
          </Token>
          .
        </>
      }
    />
  );
}
