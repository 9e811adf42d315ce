'use client';

import { clockOf, formatClock, formatFraction, mirrorWords, studyMetres, studySum, tempoWords, toFraction, valueName } from '@/engine';
import { palindromeWords } from '@/engine';
import { useState } from 'react';
import { setMetre, setTempo, setTitle } from '@/lib/client/study-edits';
import { Token } from '../ui/token';
import { TryField } from '../ui/try-field';
import { attempt, useStudy, useValueNames } from './context';
import { ExportMenu } from './export-menu';
import { TitlePage } from './title-page';

const BEATS = ['1/2', '3/4', '1/4', '3/8', '1/8', '3/16', '1/16'];

function TempoControl({ close }: { close: () => void }) {
  const { editor, state } = useStudy();
  const { tempo } = state.study;
  const valueNames = useValueNames();
  const [beat, setBeat] = useState(formatFraction(toFraction(tempo.beat)));
  const beats = BEATS.includes(beat) ? BEATS : [beat, ...BEATS];
  return (
    <>
      <label className="mb-3 block">
        <span className="mb-1 block text-[13px] text-soft">Beat</span>
        <select value={beat} onChange={(event) => setBeat(event.target.value)} className="w-full rounded border border-hair bg-paper px-2.5 py-1.5">
          {beats.map((one) => (
            <option key={one} value={one}>
              {valueName(toFraction(one), valueNames)}
            </option>
          ))}
        </select>
      </label>
      <TryField
        label="Beats a minute"
        initial={formatFraction(toFraction(tempo.perMinute))}
        hint="A whole number, a fraction or a decimal."
        onTry={(text) => attempt(editor, () => setTempo(beat, text.trim()))}
        onDone={close}
      />
    </>
  );
}

const FACT = 'font-semibold! text-[1em]! border-b!';

/** Title, metre, tempo, totals with their sums, clock time, and what mirrors what, in which sense. */
export function StudyHead() {
  const { editor, state } = useStudy();
  const { study, built } = state;
  const valueNames = useValueNames();
  const sum = studySum(study, built);
  const seconds = clockOf(study, built).total;
  const metres = studyMetres(study);
  const pairs = Math.floor(study.sections.length / 2);
  const mirrors = mirrorWords(study, built);
  const { form, values, attacks } = built.palindrome;
  const senses = [['form', pairs > 0 && form.holds], ['values', values.holds], ['attacks', attacks.holds]] as const;
  return (
    <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-4">
      <div className="min-w-0">
        <h1 className="text-[38px] font-[560] leading-[1.04] tracking-[-0.025em] [font-stretch:112%] sm:text-[58px]">
          <Token text={study.title} label="Title" className="border-b-0! px-0! font-[560]! text-[1em]! leading-[1.04]! [overflow-wrap:anywhere]">
            {(close) => <TryField wide label="Title" initial={study.title} onTry={(title) => attempt(editor, () => setTitle(title))} onDone={close} />}
          </Token>
        </h1>
        <div className="mt-3.5 flex flex-wrap gap-x-7 gap-y-1.5 text-[15px] text-soft" data-testid="facts">
          <span>
            {sum.terms && <span className="hidden md:inline">{`${sum.terms} = `}</span>}
            <b className="font-semibold text-ink">{sum.total.split(' ').slice(0, -1).join(' ')}</b> {sum.total.split(' ').at(-1)} of{' '}
            <Token text={study.metre} label="Metre" className={`${FACT} text-ink`}>
              {(close) => (
                <TryField label="Metre" initial={study.metre} hint="4/4, 7/8, or with its groups 3+2+2/8." onTry={(metre) => attempt(editor, () => setMetre(metre))} onDone={close} />
              )}
            </Token>
            {metres.length > 1 && `, also ${metres.filter((metre) => metre !== study.metre).join(', ')}`}
          </span>
          <Token text={tempoWords(study.tempo, { valueNames })} label="Tempo" className={`${FACT} text-ink`}>
            {(close) => <TempoControl close={close} />}
          </Token>
          <b className="font-semibold text-ink">{formatClock(seconds)}</b>
          <span>
            {study.players.length > 0 && (
              <>
                <b className="font-semibold text-ink">{study.players.length}</b> {study.players.length === 1 ? 'player, ' : 'players, '}
              </>
            )}
            <b className="font-semibold text-ink">{study.instruments.length}</b> {study.instruments.length === 1 ? 'instrument' : 'instruments'}
          </span>
          {mirrors && <span>{mirrors}</span>}
          <TitlePage />
        </div>
        <details className="mt-2 max-w-[80ch] text-[14px] text-soft">
          <summary className="w-fit underline decoration-hair underline-offset-[3px]">
            {`A mirror ${senses.map(([sense, holds]) => `${holds ? '' : 'not '}in ${sense}`).join(', ')}`}
          </summary>
          <ul className="mt-1.5 grid gap-1" role="list">
            {palindromeWords(built.palindrome, pairs).map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
          </ul>
        </details>
      </div>
      <ExportMenu />
    </div>
  );
}
