'use client';

import { useState } from 'react';
import { type Rhythm, type Value, applySteps, formatRhythm, stepWords } from '@/engine';
import type { Steps } from '../study/steps-editor';
import { Button } from '../ui/button';
import { type DrawnThread, Rows } from './rows';

type Traced = Value & { readonly from: number };

/** Which value of the step before each value comes from; a value that is cut in two comes from one twice. */
function threadsBetween(before: readonly Traced[], after: readonly Traced[], row: number): DrawnThread[] {
  const places = new Map(before.map(({ from }, index) => [from, index]));
  return after.flatMap(({ from, rest }, to): DrawnThread[] => {
    const place = places.get(from);
    return place === undefined || rest ? [] : [{ row, from: place, to }];
  });
}

/** A transformation worked through, forwards and backwards, each value moving to its new place. */
export function Worked({ subject, steps }: { subject: Rhythm; steps: Steps }) {
  const [shown, setShown] = useState(0);
  const traced: Traced[] = subject.map((value, from) => ({ ...value, from }));
  const stages = [traced, ...steps.map((_, index) => applySteps(traced, steps.slice(0, index + 1)))];
  const at = Math.min(shown, steps.length);
  const rows = stages.slice(0, at + 1).map((values, index) => ({ label: index === 0 ? 'Subject' : `Step ${index}`, values, isQuiet: index < at }));
  const threads = rows.slice(1).flatMap((_, index) => threadsBetween(stages[index]!, stages[index + 1]!, index));
  const words = at === 0 ? 'The subject, as it is.' : `Step ${at}: ${stepWords(steps[at - 1]!)}. It is now ${formatRhythm(stages[at]!)}.`;
  return (
    <div>
      <p role="status" className="mb-2 max-w-[80ch] text-[15px] [overflow-wrap:anywhere]">
        {words}
      </p>
      <div className="mb-3 flex gap-3">
        <Button disabled={at === 0} onClick={() => setShown(at - 1)}>
          Step back
        </Button>
        <Button disabled={at === steps.length} onClick={() => setShown(at + 1)}>
          Next step
        </Button>
      </div>
      <Rows rows={rows} threads={threads} label={words} />
    </div>
  );
}
