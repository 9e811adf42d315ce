'use client';

import { useState } from 'react';
import { type FieldControl as Control, type ProcessSection, formatFraction, toFraction } from '@/engine';
import { setProcessFields } from '@/lib/client/study-edits';
import { TextButton } from '../ui/button';
import { TryField } from '../ui/try-field';
import { Choices, Refusal } from './choices';
import { attempt, useStudy } from './context';
import type { Close } from './sentence-controls';

const INTEGER = /^\s*[-−]?\d{1,9}\s*$/;
const NO_INTEGER = 'Write a whole number.';

type Props = { readonly section: ProcessSection; readonly control: Control; readonly close: Close };

/** What a field holds now. */
const valueOf = ({ section, control }: Props): unknown => (section.process as Record<string, unknown>)[control.field];

function useField({ section, control }: Props) {
  const { editor } = useStudy();
  return (value: unknown): string | null => attempt(editor, () => setProcessFields(section.id, { [control.field]: value }));
}

/** A text that becomes a value, or is refused with a sentence. */
function TypedField({ read, initial, ...props }: Props & { initial: string; read: (text: string) => unknown }) {
  const set = useField(props);
  return (
    <TryField
      label={props.control.label}
      initial={initial}
      {...(props.control.hint === undefined ? {} : { hint: props.control.hint })}
      wide={props.control.input.kind === 'ordinals'}
      onTry={(text) => {
        try {
          return set(read(text));
        } catch (error) {
          return (error as Error).message;
        }
      }}
      onDone={props.close}
    />
  );
}

function readInteger(text: string): number {
  if (!INTEGER.test(text)) throw new Error(NO_INTEGER);
  return Number(text.trim().replace('−', '-'));
}

/** Numbers typed from 1, kept from 0. */
function readOrdinals(text: string): number[] {
  const parts = text.split(/[\s,;]+/).filter((part) => part !== '');
  return parts.map((part) => {
    if (!/^[1-9]\d{0,5}$/.test(part)) throw new Error(`“${part.slice(0, 20)}” is no number of an attack. Attacks count from 1.`);
    return Number(part) - 1;
  });
}

/** Values, attacks, or a pulse of its own. */
function RotateByField(props: Props) {
  const set = useField(props);
  const by = valueOf(props) as 'values' | 'attacks' | { pulse: string };
  const [isPulse, setPulse] = useState(typeof by === 'object');
  return (
    <>
      <Choices
        name={props.control.label}
        value={isPulse ? 'pulse' : (by as string)}
        options={[['values', 'a value'], ['attacks', 'an attack, with the rests after it'], ['pulse', 'a pulse']]}
        onTry={(value) => {
          setPulse(value === 'pulse');
          return value === 'pulse' ? null : set(value);
        }}
      />
      {isPulse && <TypedField {...props} initial={typeof by === 'object' ? by.pulse : '1/8'} read={(text) => ({ pulse: formatFraction(toFraction(text)) })} />}
    </>
  );
}

/** Until things align, or so many times. */
function UntilField(props: Props) {
  const set = useField(props);
  const until = valueOf(props) as 'alignment' | number;
  const [isCounted, setCounted] = useState(until !== 'alignment');
  return (
    <>
      <Choices
        name={props.control.label}
        value={isCounted ? 'count' : 'alignment'}
        options={[['alignment', 'until both end together'], ['count', 'so many times']]}
        onTry={(value) => {
          setCounted(value === 'count');
          return value === 'count' ? null : set('alignment');
        }}
      />
      {isCounted && <TypedField {...props} initial={until === 'alignment' ? '4' : String(until)} read={readInteger} />}
    </>
  );
}

/** Instruments in turn, the same one as often as wanted. */
function InstrumentsField(props: Props) {
  const { state } = useStudy();
  const [error, setError] = useState<string | null>(null);
  const set = useField(props);
  const ids = valueOf(props) as readonly string[];
  const change = (next: readonly string[]) => setError(set(next));
  return (
    <>
      <ol role="list" className="grid max-h-[40vh] gap-1.5 overflow-y-auto">
        {ids.map((id, index) => (
          <li key={index} className="flex items-baseline gap-3">
            <select
              aria-label={`Place ${index + 1}`}
              className="rounded border border-hair bg-paper px-2.5 py-1"
              value={id}
              onChange={(event) => change(ids.with(index, event.target.value))}
            >
              {state.study.instruments.map((one) => (
                <option key={one.id} value={one.id}>
                  {one.name}
                </option>
              ))}
            </select>
            <TextButton className="text-[14px]" disabled={ids.length === 1} aria-label={`Take place ${index + 1} away`} onClick={() => change(ids.toSpliced(index, 1))}>
              Take away
            </TextButton>
          </li>
        ))}
      </ol>
      <TextButton className="mt-2 text-[14px]" onClick={() => change([...ids, state.study.instruments.find((one) => !ids.includes(one.id))?.id ?? ids[0]!])}>
        Add one more
      </TextButton>
      <Refusal text={error} />
    </>
  );
}

function ChoiceField({ options, ...props }: Props & { options: readonly (readonly [string, string])[] }) {
  const set = useField(props);
  return <Choices name={props.control.label} value={String(valueOf(props))} options={options} onTry={set} />;
}

/** The control of a field of a process, as the process says that it is typed or chosen. */
export function FieldControl(props: Props) {
  const { input } = props.control;
  const value = valueOf(props);
  switch (input.kind) {
    case 'integer':
      return <TypedField {...props} initial={String(value)} read={readInteger} />;
    case 'exact':
      return <TypedField {...props} initial={String(value)} read={(text) => formatFraction(toFraction(text))} />;
    case 'ordinals':
      return <TypedField {...props} initial={(value as number[]).map((n) => n + 1).join(', ')} read={readOrdinals} />;
    case 'choice':
      return <ChoiceField {...props} options={input.options} />;
    case 'rotate-by':
      return <RotateByField {...props} />;
    case 'until':
      return <UntilField {...props} />;
    case 'instruments':
      return <InstrumentsField {...props} />;
  }
}
