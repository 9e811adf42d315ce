'use client';

import { useRouter } from 'next/navigation';
import { type ReactNode, useId, useState } from 'react';
import type { StudyInput } from '@/engine';
import { EngineError } from '@/engine';
import { beginStudy } from '@/lib/client/new-study';
import { TextButton } from '../ui/button';
import { Token } from '../ui/token';
import { TryField } from '../ui/try-field';

/** What a calculator has worked out. */
export type Answer = {
  /** the sum or the number, large */
  readonly result: string;
  /** beside it: what it counts, and decimals */
  readonly unit?: string;
  /** what does not hold, in one sentence */
  readonly failing?: string;
  /** whole sentences */
  readonly notes: readonly string[];
  readonly picture?: ReactNode;
  readonly study?: () => StudyInput;
};

/** Works something out; what is refused becomes a sentence. */
export function workOut(work: () => Answer): Answer | { readonly problem: string } {
  try {
    return work();
  } catch (error) {
    if (error instanceof EngineError) return { problem: error.message };
    throw error;
  }
}

/** A word of a calculator's sentence: what is typed is tried first, and refused with the reason. */
export function Typed({ text, label, value, hint, onTry }: { text?: string; label: string; value: string; hint?: string; onTry: (text: string) => void }) {
  const attempt = (typed: string): string | null => {
    try {
      onTry(typed);
      return null;
    } catch (error) {
      if (error instanceof EngineError) return error.message;
      throw error;
    }
  };
  return (
    <Token text={text ?? (value === '' ? '…' : value)} label={label}>
      {(close) => <TryField wide label={label} initial={value} {...(hint === undefined ? {} : { hint })} onTry={attempt} onDone={close} />}
    </Token>
  );
}

function Tools({ text, study }: { text: string; study?: (() => StudyInput) | undefined }) {
  const router = useRouter();
  const [said, setSaid] = useState('');
  const copy = async () => {
    const isCopied = await navigator.clipboard.writeText(text).then(
      () => true,
      () => false,
    );
    setSaid(isCopied ? 'Copied.' : 'This browser does not let the page copy: select the text instead.');
  };
  const begin = () => {
    try {
      const id = study ? beginStudy(study()) : null;
      if (id === null) setSaid('This browser does not let a study be kept: its storage is full or closed.');
      else router.push(`/studies/${id}`);
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      setSaid(error.message);
    }
  };
  return (
    <p className="mt-4 flex flex-wrap items-baseline gap-x-5 gap-y-1 text-[14px]">
      <TextButton onClick={() => void copy()}>Copy as text</TextButton>
      {study && <TextButton onClick={begin}>Make a study of this</TextButton>}
      <span role="status" className="text-soft">
        {said}
      </span>
    </p>
  );
}

/** One calculator: its sentence, its answer with the sum, and its picture to scale. */
export function Calculator({ heading, sentence, spoken, answer }: { heading: string; sentence: ReactNode; spoken: string; answer: Answer | { readonly problem: string } }) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="grid gap-x-14 gap-y-6 border-t border-ink pb-9 pt-5 lg:grid-cols-[minmax(0,1fr)_minmax(0,560px)]">
      <div className="min-w-0">
        <h2 id={id} className="mb-2 text-[15px] font-semibold">
          {heading}
        </h2>
        <p className="font-serif text-[21px] leading-[1.6] sm:text-[24px]">{sentence}</p>
        {'problem' in answer ? (
          <p role="alert" className="mt-3 text-mark">
            {answer.problem}
          </p>
        ) : (
          <div role="status">
            <p className="mt-3 text-[26px] font-[560] leading-tight tracking-[-0.015em] [overflow-wrap:anywhere] sm:text-[30px]" data-testid="result">
              {answer.result}
              {answer.unit && <small className="ml-2 text-[16px] font-normal tracking-normal text-soft">{answer.unit}</small>}
            </p>
            <p className="mt-1.5 max-w-[74ch]" data-testid="notes">
              {answer.failing && <span className="font-[560] text-mark">{`${answer.failing} `}</span>}
              <span className="text-soft">{answer.notes.join(' ')}</span>
            </p>
          </div>
        )}
        {!('problem' in answer) && <Tools text={[spoken, `${answer.result}${answer.unit ? ` ${answer.unit}` : ''}`, ...(answer.failing ? [answer.failing] : []), ...answer.notes].join('\n')} study={answer.study} />}
      </div>
      <div className="min-w-0">{!('problem' in answer) && answer.picture}</div>
    </section>
  );
}
