'use client';

import { parseRhythm, valueName } from '@/engine';
import { type Marks, withMark } from '@/lib/client/print-edits';
import type { Edit } from '@/lib/client/study-edits';
import { TextButton } from '../ui/button';
import { Token } from '../ui/token';
import { attempt, useStudy, useValueNames } from './context';

const WORDS = { 'let-ring': 'rings on', choke: 'is stopped short' } as const;
/** Attacks that are offered one by one; of a longer rhythm, the first. */
const MOST = 128;

function summary(marks: Marks): string {
  if (marks.length === 0) return 'Every attack ends as it is written';
  return marks.map(({ attack, ends }) => `attack ${attack + 1} ${WORDS[ends]}`).join(', ');
}

/** How attacks end: as they are written, ringing on, or stopped short. The mark goes wherever the attack goes. */
export function MarksControl({ rhythm, marks = [], label, set }: { rhythm: string; marks?: Marks | undefined; label: string; set: (marks: Marks) => Edit }) {
  const { editor } = useStudy();
  const names = useValueNames();
  const sounding = parseRhythm(rhythm).filter(({ rest }) => !rest);
  const beyond = marks.filter(({ attack }) => attack >= sounding.length);
  const put = (next: Marks) => attempt(editor, () => set(next));
  return (
    <Token text={summary(marks)} label={label} className="border-b! text-[13.5px]! font-normal!">
      {() => (
        <div className="grid gap-1.5">
          {sounding.slice(0, MOST).map(({ length }, attack) => (
            <label key={attack} className="flex items-baseline justify-between gap-4 text-[14px]">
              <span>{`Attack ${attack + 1}, ${valueName(length, names)}`}</span>
              <select
                className="rounded border border-hair bg-paper px-1.5 py-1"
                value={marks.find((mark) => mark.attack === attack)?.ends ?? ''}
                onChange={(event) => put(withMark(marks, attack, event.target.value === '' ? null : (event.target.value as Marks[number]['ends'])))}
              >
                <option value="">ends as written</option>
                <option value="let-ring">rings on</option>
                <option value="choke">is stopped short</option>
              </select>
            </label>
          ))}
          {beyond.map(({ attack }) => (
            <p key={attack} className="text-[13.5px] text-mark">
              {`There is no attack ${attack + 1} any more. `}
              <TextButton onClick={() => put(withMark(marks, attack, null))}>Take its mark away</TextButton>
            </p>
          ))}
        </div>
      )}
    </Token>
  );
}
