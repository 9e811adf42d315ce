'use client';

import { useMemo } from 'react';
import { type CheckedAnswer, EngineError, type Metre, type Rhythm, checkAnswer, formatRhythm, parseMetre, parseRhythm, stepWords } from '@/engine';
import { tidyRhythm } from '@/lib/client/typed-rhythm';
import type { Steps } from '../study/steps-editor';
import { StepsEditor } from '../study/steps-editor';
import { Button } from '../ui/button';
import { Token } from '../ui/token';
import { useReady } from '../ui/use-ready';
import { type DrawnRow, type DrawnThread, Rows } from './rows';
import { TextField } from './text-field';
import { useHearing } from './use-hearing';
import { Worked } from './worked';

/** Reads what can be read; null where a text is empty or cannot. */
export function readRhythm(text: string): Rhythm | null {
  try {
    return text.trim() === '' ? null : parseRhythm(tidyRhythm(text));
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
}

type Checked = { readonly checked: CheckedAnswer } | { readonly problem: string } | null;

function check(subject: string, steps: Steps, answer: string, metre: Metre): Checked {
  if (readRhythm(subject) === null || readRhythm(answer) === null) return null;
  try {
    return { checked: checkAnswer({ subject: tidyRhythm(subject), steps, answer: tidyRhythm(answer), metre }) };
  } catch (error) {
    if (error instanceof EngineError) return { problem: error.message };
    throw error;
  }
}

/** The key and the answer one under the other; what came too early or too late is tied in colour. */
function picture({ values }: CheckedAnswer): { rows: DrawnRow[]; threads: DrawnThread[] } {
  const key = values.flatMap(({ expected }) => (expected ? [expected] : []));
  const given = values.flatMap((value) => (value.given ? [value.given] : []));
  const wrong = new Set<number>();
  const threads: DrawnThread[] = [];
  let [from, to] = [0, 0];
  let [keyAt, givenAt] = [0, 0];
  for (const { expected, given: own, verdict } of values) {
    if (own && verdict !== 'right') wrong.add(to);
    if (expected && own && !expected.rest && !own.rest) threads.push({ row: 0, from, to, isWrong: Math.abs(keyAt - givenAt) > 1e-9 });
    if (expected) [from, keyAt] = [from + 1, keyAt + expected.length.valueOf()];
    if (own) [to, givenAt] = [to + 1, givenAt + own.length.valueOf()];
  }
  return { rows: [{ label: 'Should be', values: key, isQuiet: true }, { label: 'Yours', values: given, wrong }], threads };
}

const VERDICTS: Readonly<Record<CheckedAnswer['values'][number]['verdict'], string>> = {
  right: 'right, 1 mark', 'wrong-length': 'wrong length', 'wrong-kind': 'a rest for an attack, or the reverse', missing: 'missing', extra: 'too many',
};

/** Every value of the key beside the answer's, with its mark. */
function ValueTable({ checked: { values } }: { checked: CheckedAnswer }) {
  return (
    <details className="mt-8 border-t border-hair pt-4">
      <summary className="w-fit cursor-pointer font-semibold">Marks value by value</summary>
      <div className="mt-3 max-h-[420px] overflow-auto" role="region" aria-label="Marks value by value" tabIndex={0}>
        <table className="text-left text-[14.5px]">
          <thead>
            <tr className="text-[13px] text-soft">
              {['Value', 'Should be', 'Yours', 'Mark'].map((heading) => (
                <th key={heading} scope="col" className="pb-1 pr-8 font-normal">
                  {heading}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {values.map(({ expected, given, verdict }, index) => (
              <tr key={index} className="border-t border-hair">
                <th scope="row" className="py-1 pr-8 font-normal text-soft">
                  {index + 1}
                </th>
                <td className="pr-8 font-mono">{expected ? formatRhythm([expected]) : '–'}</td>
                <td className={`pr-8 font-mono ${verdict === 'right' ? '' : 'text-mark'}`}>{given ? formatRhythm([given]) : '–'}</td>
                <td>{VERDICTS[verdict]}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}

/** The attacks of the answer that are wrong, by their number in it. */
function wrongAttacks({ values }: CheckedAnswer): ReadonlySet<number> {
  const wrong = new Set<number>();
  let attack = -1;
  for (const { given, verdict } of values) {
    if (given === undefined || given.rest) continue;
    attack += 1;
    if (verdict !== 'right') wrong.add(attack);
  }
  return wrong;
}

function Verdict({ checked }: { checked: CheckedAnswer }) {
  const { correct, diagnoses, marks, spelling } = checked;
  const [first, ...others] = diagnoses;
  const [heading, ...rest] = first ? first.message.split(/(?<=[.:]) /) : [];
  return (
    <section aria-labelledby="verdict" className="mt-8 grid gap-x-14 gap-y-6 border-t border-ink pt-6 md:grid-cols-[minmax(0,1fr)_260px]">
      <div role="status">
        <h2 id="verdict" className="text-[25px] font-[580] leading-tight tracking-[-0.01em]">
          {correct && !first ? 'Right' : (heading ?? '').replace(/[.:]$/, '')}
        </h2>
        {correct && !first && <p className="mt-2">Every value is as long as it should be, and in its place.</p>}
        {rest.length > 0 && <p className="mt-2 max-w-[72ch] first-letter:uppercase [overflow-wrap:anywhere]">{rest.join(' ')}</p>}
        {others.length > 0 && (
          <ul role="list" className="mt-3 grid max-w-[72ch] gap-1.5 text-soft">
            {others.map(({ code, message, at }) => (
              <li key={`${code} ${at.value}`} className="[overflow-wrap:anywhere]">
                {message}
              </li>
            ))}
          </ul>
        )}
        {spelling.length > 0 && (
          <div className="mt-4 max-w-[72ch]" data-testid="spelling">
            <h3 className="text-[15px] font-semibold">Spelling, apart from the marks</h3>
            {spelling.map(({ value, message }) => (
              <p key={value} className="text-soft">
                {message}
              </p>
            ))}
          </div>
        )}
      </div>
      <div>
        <p className="text-[44px] font-[560] leading-none tracking-[-0.02em]" data-testid="marks">
          {marks.got} <span className="text-[24px] text-soft">{`of ${marks.of} ${marks.of === 1 ? 'value' : 'values'}`}</span>
        </p>
        <p className="mt-2 text-[14px] text-soft">One mark a value; rests side by side are one.</p>
      </div>
    </section>
  );
}

export type CheckState = { readonly subject: string; readonly answer: string; readonly metre: string; readonly steps: Steps };

const isMetre = (text: string): boolean => {
  try {
    return parseMetre(text).count > 0;
  } catch {
    return false;
  }
};

/** A worked transformation, checked: what is wrong first, where, and the habit that avoids it. */
export function AnswerCheck({ state, set }: { state: CheckState; set: (change: Partial<CheckState>) => void }) {
  const isReady = useReady();
  const { subject, answer, steps } = state;
  const metre = isMetre(state.metre) ? parseMetre(state.metre).text : '4/4';
  const result = useMemo(() => check(subject, steps, answer, metre), [subject, steps, answer, metre]);
  const checked = result !== null && 'checked' in result ? result.checked : null;
  const drawn = useMemo(() => (checked ? picture(checked) : null), [checked]);
  const wrong = useMemo(() => (checked ? wrongAttacks(checked) : undefined), [checked]);
  const { heard, hear, stop, playing } = useHearing();
  const from = readRhythm(subject);
  const sounds: [string, Rhythm | null][] = [['the subject', from], ['what it should be', checked?.expected ?? null], ['the answer', readRhythm(answer)]];
  return (
    <>
      <p className="mt-3 max-w-[60ch] font-serif text-[22px] leading-[1.6] sm:text-[26px]" data-testid="check-sentence">
        The answer should be the subject{' '}
        <Token text={steps.length === 0 ? 'as it is' : steps.map(stepWords).join(', then ')} label="What should be done to it">
          {() => (
            <StepsEditor
              steps={steps}
              onTry={(next) => {
                set({ steps: next });
                return null;
              }}
            />
          )}
        </Token>
        .
      </p>
      <div className="mt-6 grid gap-6">
        <TextField label="Subject" value={subject} metre={metre} hint="Lengths in whole notes; rests in round brackets; 1/4+1/16 is tied; | is a bar line." onChange={(text) => set({ subject: text })} />
        <TextField label="Your answer" value={answer} metre={metre} {...(wrong ? { wrong } : {})} onChange={(text) => set({ answer: text })} />
        <label className="w-fit text-[14px]">
          Metre{' '}
          <input
            readOnly={!isReady}
            value={state.metre}
            aria-invalid={!isMetre(state.metre)}
            onChange={(event) => set({ metre: event.target.value })}
            className="ml-2 w-28 rounded border border-hair bg-paper px-2.5 py-1.5 aria-invalid:border-mark"
          />
          {!isMetre(state.metre) && <span className="ml-3 text-mark">Write a metre such as 4/4, 7/8 or 3+2+2/8.</span>}
        </label>
      </div>
      <div className="mt-4 flex flex-wrap items-baseline gap-x-5 gap-y-2">
        {sounds.map(([name, rhythm]) => (
          <Button key={name} disabled={rhythm === null} onClick={() => (heard === name ? stop() : rhythm && hear(name, rhythm))}>
            {heard === name ? 'Stop' : `Hear ${name}`}
          </Button>
        ))}
        <span className="text-[13px] text-soft">{playing.problem ?? 'Starts quiet and is limited; turn it up with care, above all in headphones.'}</span>
      </div>
      {result !== null && 'problem' in result && (
        <p role="alert" className="mt-6 text-mark">
          {result.problem}
        </p>
      )}
      {checked && drawn && (
        <>
          <div className="mt-8">
            <Rows {...drawn} measure={parseMetre(metre).length} label={`Should be: ${formatRhythm(checked.expected)}. Yours: ${answer}.`} />
          </div>
          <Verdict checked={checked} />
          <ValueTable checked={checked} />
          {from && steps.length > 0 && (
            <details className="mt-8 border-t border-hair pt-4">
              <summary className="w-fit cursor-pointer font-semibold">Worked step by step</summary>
              <div className="mt-4">
                <Worked subject={from} steps={steps} />
              </div>
            </details>
          )}
        </>
      )}
    </>
  );
}
