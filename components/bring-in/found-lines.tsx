'use client';

import { useEffect, useId, useMemo, useRef, useState } from 'react';
import { type Candidate, attacks, formatFraction, measuresOf, totalLength } from '@/engine';
import { canBeHeld, firstMeasures, firstRange, taken, typedRange } from '@/lib/client/bring-in';
import { RhythmStaff } from '../study/rhythm-staff';
import { TextButton } from '../ui/button';
import { DestinationForm } from './destination-form';

const FIELD = 'w-20 rounded border border-hair bg-paper px-2.5 py-1.5 aria-invalid:border-mark';

const counted = (count: string, what: string): string => `${count} ${what}${count === '1' ? '' : 's'}`;

/** The lines of a file, by radio buttons, each with its first measures. */
function LineChoice({ lines, chosen, onChoose }: { lines: readonly Candidate[]; chosen: number; onChoose: (index: number) => void }) {
  const name = useId();
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-[13px] text-soft">Line</legend>
      <div className="max-h-72 overflow-y-auto border-y border-hair">
        {lines.map((line, index) => (
          <label key={line.name} className="flex cursor-pointer flex-wrap items-baseline gap-x-3 border-b border-hair px-1 py-1.5 last:border-b-0 hover:bg-wash">
            <input type="radio" name={name} checked={index === chosen} onChange={() => onChoose(index)} className="accent-ink" />
            <span className="font-semibold [overflow-wrap:anywhere]">{line.name}</span>{' '}
            <code className="min-w-0 font-mono text-[12.5px] text-soft [overflow-wrap:anywhere]">{firstMeasures(line)}</code>
          </label>
        ))}
      </div>
    </fieldset>
  );
}

/** One line: which measures of it, how, and what it becomes. */
function ChosenLine({ line, onDone }: { line: Candidate; onDone: (sentence: string) => void }) {
  const id = useId();
  const first = useMemo(() => firstRange(line), [line]);
  const [from, setFrom] = useState(line.measures[first.from]!.number);
  const [to, setTo] = useState(line.measures[first.to]!.number);
  const [isHeld, setHeld] = useState(false);
  const range = typedRange(line, from, to);
  const { from: begin, to: end } = typeof range === 'string' ? first : range;
  const cut = useMemo(() => taken(line, { from: begin, to: end }, isHeld), [line, begin, end, isHeld]);
  const { metre } = line.measures[begin]!;
  const length = totalLength(cut.rhythm);
  const isSilent = cut.rhythm.every(({ rest }) => rest);
  const remarks = [
    ...(cut.isCutBefore ? ['What is struck before these measures and sounds on into them is a rest.'] : []),
    ...(cut.isCutAfter ? ['The last attack sounds on beyond these measures: it was shortened.'] : []),
  ];
  return (
    <>
      {line.measures.length > 1 && (
        <fieldset className="mt-4">
          <legend className="mb-1 text-[13px] text-soft">{`Measures, of ${line.measures[0]!.number} to ${line.measures.at(-1)!.number}`}</legend>
          <div className="flex flex-wrap items-baseline gap-x-3 gap-y-2">
            <label>
              from <input value={from} aria-label="From measure" aria-invalid={typeof range === 'string'} aria-describedby={typeof range === 'string' ? `${id}-range` : undefined} onChange={(event) => setFrom(event.target.value)} className={FIELD} />
            </label>
            <label>
              to <input value={to} aria-label="To measure" aria-invalid={typeof range === 'string'} aria-describedby={typeof range === 'string' ? `${id}-range` : undefined} onChange={(event) => setTo(event.target.value)} className={FIELD} />
            </label>
          </div>
          {typeof range === 'string' && (
            <p id={`${id}-range`} role="alert" className="mt-1.5 text-[13.5px] text-mark">
              {range}
            </p>
          )}
        </fieldset>
      )}
      {(isHeld || canBeHeld(cut.rhythm)) && (
        <label className="mt-3 flex cursor-pointer items-baseline gap-2.5">
          <input type="checkbox" checked={isHeld} onChange={(event) => setHeld(event.target.checked)} className="accent-ink" />
          Hold each attack until the next
        </label>
      )}
      {typeof range !== 'string' && (
        <>
          <div className="mt-3">
            <RhythmStaff text={cut.text} metre={metre} />
          </div>
          <p className="mt-1 text-[13px] text-soft" data-testid="taken">
            {`${counted(String(cut.rhythm.length), 'value')}, ${counted(String(attacks(cut.rhythm).length), 'attack')}, ${counted(formatFraction(length), 'whole note')} = ${counted(measuresOf(length, metre).toFraction(true), 'measure')} of ${metre}.`}
          </p>
        </>
      )}
      {(line.warnings.length > 0 || remarks.length > 0) && (
        <>
          <h4 className="mt-4 text-[13px] text-soft">To know</h4>
          <ul className="mt-0.5 list-disc pl-5 text-[14px]" aria-label="What was left out or supposed">
            {[...remarks, ...line.warnings].map((warning) => (
              <li key={warning}>{warning}</li>
            ))}
          </ul>
        </>
      )}
      <DestinationForm key={line.name} line={line} text={cut.text} problem={typeof range === 'string' ? range : isSilent ? 'These measures hold no attack. Choose others.' : null} onDone={onDone} />
    </>
  );
}

/** What a file holds: a line is chosen, then measures of it, then what it becomes. */
export function FoundLines({ lines, onDone, onClose }: { lines: readonly Candidate[]; onDone: (sentence: string) => void; onClose: () => void }) {
  const [chosen, setChosen] = useState(0);
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    heading.current?.focus({ preventScroll: true });
    heading.current?.scrollIntoView({ block: 'start' });
  }, []);
  const line = lines[chosen]!;
  return (
    <div className="mt-3 max-w-[960px] border-t border-ink pt-3">
      <h3 ref={heading} tabIndex={-1} className="mb-2 scroll-mt-6 text-[15px] font-semibold outline-none">
        {lines.length === 1 ? line.name : 'Choose a line'}
      </h3>
      {lines.length > 1 && <LineChoice lines={lines} chosen={chosen} onChoose={setChosen} />}
      <ChosenLine key={line.name} line={line} onDone={onDone} />
      <TextButton className="mt-3 text-[14px]" onClick={onClose}>
        Put the file away
      </TextButton>
    </div>
  );
}
