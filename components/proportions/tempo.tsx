'use client';

import { type Fraction, type ValueNames, formatFraction, tempoChain, toFraction, valueName } from '@/engine';
import { readNumber } from '@/lib/client/typed-number';
import { EngineError } from '@/engine';
import { Choices } from '../study/choices';
import { Token } from '../ui/token';
import { Bars, unitTicks } from './bars';
import { type Answer, Calculator, Typed, workOut } from './calculator';

const VALUES = ['1', '3/4', '1/2', '3/8', '1/3', '1/4', '3/16', '1/6', '1/8', '1/12', '1/16'] as const;
export const valueWords = (length: string, names: ValueNames = 'american'): string => {
  const triplet = ({ '1/3': '1/2', '1/6': '1/4', '1/12': '1/8' } as const)[length as '1/3' | '1/6' | '1/12'];
  return triplet === undefined ? valueName(toFraction(length), names) : `triplet ${valueName(toFraction(triplet), names)}`;
};

/** Pivots as an address keeps them: `3/8=1/4;1/4=1/6`. @throws EngineError */
export function readPivots(text: string): { before: string; after: string }[] {
  return text.split(';').filter((part) => part.trim() !== '').slice(0, 12).map((part) => {
    const [before = '', after = ''] = part.split('=');
    return { before: formatFraction(readNumber(before)), after: formatFraction(readNumber(after)) };
  });
}

const decimal = (value: Fraction): string => (value.d === 1n ? '' : `, about ${value.valueOf().toFixed(2)}`);

function work(tempoText: string, pivots: readonly { before: string; after: string }[]): Answer {
  const perMinute = readNumber(tempoText);
  const chain = tempoChain({ beat: '1/4', perMinute }, pivots);
  const last = chain.at(-1)!;
  const whole = last.perMinute.div(chain[0]!.perMinute);
  const products = chain.slice(1).map(({ factor }) => formatFraction(factor));
  const isOff = last.off.n !== 0n;
  const slower = whole.inverse();
  const notes = [
    whole.equals(1) ? 'Everything lasts as long as before.' : `Everything written the same now lasts ${formatFraction(slower)} as long: ${slower.compare(1) > 0 ? 'augmentation' : 'diminution'} by tempo.`,
    ...(chain.length > 2 ? [`On the way: ${chain.slice(1, -1).map(({ perMinute: one }) => `quarter = ${one.toFraction(true)}`).join(', ')}.`] : []),
    isOff
      ? `A metronome of whole numbers shows ${formatFraction(last.metronome)}, and would be ${last.off.abs().toFraction(true)} of a beat ${last.off.s > 0n ? 'ahead' : 'behind'} after a minute.`
      : `A metronome shows ${formatFraction(last.metronome)}, and is exact.`,
  ];
  const slowest = chain.reduce((least, { perMinute: one }) => (one.compare(least) < 0 ? one : least), chain[0]!.perMinute);
  const extent = (6 * 60) / slowest.valueOf();
  const bars = chain.map(({ perMinute: one }, index) => ({ length: extent, label: `quarter = ${one.toFraction(true)}`, ticks: unitTicks(extent, 60 / one.valueOf()), isQuiet: index < chain.length - 1 }));
  return {
    result: `quarter = ${last.perMinute.toFraction(true)}`,
    unit: `exactly${decimal(last.perMinute)}${products.length > 0 ? `; ${formatFraction(perMinute)} × ${products.join(' × ')}` : ''}`,
    notes,
    picture: <Bars bars={bars} label={chain.map(({ perMinute: one }) => `quarter = ${one.toFraction(true)}`).join(', then ')} />,
    study: () => ({
      title: 'Tempos', metre: '4/4', tempo: { beat: '1/4', perMinute: formatFraction(perMinute) },
      instruments: [{ id: 'claves', name: 'Claves', family: 'wood', sound: 'claves' }],
      sections: chain.map(({ perMinute: one }, index) => ({
        id: `tempo-${index + 1}`, name: `Quarter = ${one.toFraction(true)}`, role: 'other' as const, kind: 'free' as const,
        tempo: { beat: '1/4', perMinute: formatFraction(one) }, lines: [{ instrument: 'claves', rhythm: '[1/4 1/4 1/4 1/4]x2' }],
      })),
    }),
  };
}

function ValueWord({ value, label, onChange }: { value: string; label: string; onChange: (value: string) => void }) {
  return (
    <Token text={valueWords(value)} label={label}>
      {() => (
        <Choices
          name={label}
          value={value}
          options={[...new Set([...VALUES, value])].map((one) => [one, valueWords(one)] as const)}
          onTry={(next) => {
            onChange(next);
            return null;
          }}
        />
      )}
    </Token>
  );
}

export function TempoCalculator({ tempo, pivots, set }: { tempo: string; pivots: string; set: (change: { tempo?: string; pivots?: string }) => void }) {
  let read: { before: string; after: string }[] = [];
  try {
    read = readPivots(pivots);
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
  }
  const answer = workOut(() => work(tempo, readPivots(pivots)));
  const put = (next: typeof read) => set({ pivots: next.map(({ before, after }) => `${before}=${after}`).join(';') });
  const words = read.map(({ before, after }) => `the old ${valueWords(before)} becomes the new ${valueWords(after)}`).join(', then ');
  return (
    <Calculator
      heading="Tempo"
      spoken={`At quarter = ${tempo}, ${words}.`}
      answer={answer}
      sentence={
        <>
          At{' '}
          <Typed
            text={`quarter = ${tempo}`}
            label="Quarters a minute"
            value={tempo}
            onTry={(text) => {
              tempoChain({ beat: '1/4', perMinute: readNumber(text) }, []);
              set({ tempo: text.trim() });
            }}
          />
          {read.map(({ before, after }, index) => (
            <span key={index}>
              {index === 0 ? ', the old ' : ', then the old '}
              <ValueWord value={before} label={`Old value, change ${index + 1}`} onChange={(value) => put(read.with(index, { before: value, after }))} /> becomes the new{' '}
              <ValueWord value={after} label={`New value, change ${index + 1}`} onChange={(value) => put(read.with(index, { before, after: value }))} />
            </span>
          ))}
          .{' '}
          <span className="font-sans text-[14px]">
            {read.length < 8 && (
              <button type="button" className="underline underline-offset-[3px]" onClick={() => put([...read, { before: '1/4', after: '3/8' }])}>
                Go on
              </button>
            )}{' '}
            {read.length > 1 && (
              <button type="button" className="ml-3 underline underline-offset-[3px]" onClick={() => put(read.slice(0, -1))}>
                Take the last change away
              </button>
            )}
          </span>
        </>
      }
    />
  );
}
