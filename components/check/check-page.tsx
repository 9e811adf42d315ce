'use client';

import Link from 'next/link';
import { useState } from 'react';
import { PageHeading } from '../ui/page-heading';
import { Segments } from '../ui/segments';
import { useAddress } from '../ui/use-address';
import { AnswerCheck, type CheckState } from './answer-check';
import { WhatWasDone } from './what-was-done';

export type CheckAddress = CheckState & { readonly mode: 'check' | 'find'; readonly from: string; readonly to: string };

/** An answer checked against what should have been done, or what was done found out; all of it in the address. */
export function CheckPage({ initial }: { initial: CheckAddress }) {
  const [state, setState] = useState(initial);
  const set = (change: Partial<CheckAddress>) => setState((before) => ({ ...before, ...change }));
  const { mode, subject, answer, metre, steps, from, to } = state;
  useAddress(mode === 'check' ? { subject, answer, metre, steps: JSON.stringify(steps) } : { mode, from, to, metre });
  return (
    <main className="mx-auto max-w-[1240px] px-5 pb-24 pt-10 sm:px-8 lg:px-12">
      <PageHeading text={mode === 'check' ? 'Check a worked transformation' : 'What was done to it?'}>
        <Segments label="Question" value={mode} options={[['check', 'Is this right?'], ['find', 'What was done to it?']]} onChange={(next) => set({ mode: next })} />
      </PageHeading>
      {mode === 'check' ? <AnswerCheck state={state} set={set} /> : <WhatWasDone from={from} to={to} metre={metre} set={set} />}
      <p className="mt-10 text-[13.5px] text-soft">
        The same for programs:{' '}
        <Link href="/open-api" className="underline underline-offset-[3px]">
          open API
        </Link>
      </p>
    </main>
  );
}
