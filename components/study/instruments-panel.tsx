'use client';

import { type FormEvent, useState } from 'react';
import type { Family, Instrument } from '@/engine';
import { NAMED_SOUNDS } from '@/lib/client/player';
import { addInstrument, changeInstrument, moveInstrument, removeInstrument } from '@/lib/client/study-edits';
import { Button, TextButton } from '../ui/button';
import { Token } from '../ui/token';
import { TryField } from '../ui/try-field';
import { attempt, useStudy } from './context';
import { FAMILY_WORDS, TEXTURES, tint, tintStyle } from './family';
import { HearingCaution } from './hearing';

const FAMILIES = Object.keys(FAMILY_WORDS) as Family[];
const FIELD = 'rounded border border-hair bg-paper px-2.5 py-1.5';
const soundsOf = (family: Family): string[] => Object.keys(NAMED_SOUNDS[family]);
const spoken = (sound: string): string => sound.replaceAll('-', ' ');

function Row({ instrument, index, count, onTry }: { instrument: Instrument; index: number; count: number; onTry: (answer: string | null) => void }) {
  const { editor, state } = useStudy();
  const change = (next: Partial<Omit<Instrument, 'id'>>) => onTry(attempt(editor, () => changeInstrument(instrument.id, next)));
  return (
    <tr className="border-t border-hair align-baseline">
      <th scope="row" className="py-2 pr-4 text-left font-semibold">
        <span aria-hidden className={`mr-2 inline-block h-3 w-6 ${TEXTURES[instrument.family]}`} style={tintStyle(state.study, instrument.id)} />
        <Token text={instrument.name} label="Name of the instrument" className="border-b! text-[1em]!" style={{ color: tint(state.study, instrument.id) }}>
          {(close) => <TryField label="Name" initial={instrument.name} onTry={(name) => attempt(editor, () => changeInstrument(instrument.id, { name }))} onDone={close} />}
        </Token>
      </th>
      <td className="pr-4">
        <select aria-label={`Family of ${instrument.name}`} className={FIELD} value={instrument.family} onChange={(event) => change({ family: event.target.value as Family })}>
          {FAMILIES.map((family) => (
            <option key={family} value={family}>
              {FAMILY_WORDS[family]}
            </option>
          ))}
        </select>
      </td>
      <td className="pr-4">
        <select aria-label={`Sound of ${instrument.name}`} className={FIELD} value={instrument.sound ?? ''} onChange={(event) => change({ sound: event.target.value })}>
          {[...new Set([instrument.sound ?? '', ...soundsOf(instrument.family)])].map((sound) => (
            <option key={sound} value={sound}>
              {sound === '' ? 'of its family' : spoken(sound)}
            </option>
          ))}
        </select>
      </td>
      <td className="pr-4">
        <select aria-label={`Sounds of ${instrument.name}`} className={FIELD} value={instrument.sounds ?? 1} onChange={(event) => change({ sounds: Number(event.target.value) })}>
          {[1, 2, 3, 4, 5].map((n) => (
            <option key={n} value={n}>
              {n}
            </option>
          ))}
        </select>
      </td>
      <td className="flex flex-wrap gap-x-4 py-2 text-[14px]">
        <TextButton disabled={index === 0} aria-label={`Move ${instrument.name} up`} onClick={() => onTry(attempt(editor, () => moveInstrument(instrument.id, -1)))}>
          Up
        </TextButton>
        <TextButton disabled={index === count - 1} aria-label={`Move ${instrument.name} down`} onClick={() => onTry(attempt(editor, () => moveInstrument(instrument.id, 1)))}>
          Down
        </TextButton>
        <TextButton aria-label={`Remove ${instrument.name}`} onClick={() => onTry(attempt(editor, () => removeInstrument(instrument.id)))}>
          Remove
        </TextButton>
      </td>
    </tr>
  );
}

/** The list of instruments, in the order of the score. */
export function InstrumentsPanel() {
  const { editor, state } = useStudy();
  const [error, setError] = useState<string | null>(null);
  const [name, setName] = useState('');
  const [family, setFamily] = useState<Family>('metal');
  const { instruments } = state.study;
  const add = (event: FormEvent) => {
    event.preventDefault();
    const answer = attempt(editor, () => addInstrument(name.trim(), family, soundsOf(family)[0] ?? ''));
    setError(answer);
    if (answer === null) setName('');
  };
  return (
    <section aria-labelledby="instruments-heading" className="mt-10 min-w-0">
      <h2 id="instruments-heading" className="mb-2 text-[15px] font-semibold">
        Instruments
      </h2>
      <div className="overflow-x-auto">
        <table className="w-full min-w-[640px] text-[14.5px]">
          <thead>
            <tr className="text-left text-[13px] text-soft">
              {['Name', 'Family', 'Sound', 'Sounds', 'Order'].map((head) => (
                <th key={head} scope="col" className="pb-1 font-normal">
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {instruments.map((instrument, index) => (
              <Row key={instrument.id} instrument={instrument} index={index} count={instruments.length} onTry={setError} />
            ))}
          </tbody>
        </table>
      </div>
      {error && (
        <p role="alert" className="mt-2 text-[14px] text-mark">
          {error}
        </p>
      )}
      <form onSubmit={add} className="mt-3 flex flex-wrap items-end gap-3 border-t border-hair pt-3">
        <label>
          <span className="mb-1 block text-[13px] text-soft">New instrument</span>
          <input value={name} onChange={(event) => setName(event.target.value)} className={FIELD} autoComplete="off" />
        </label>
        <label>
          <span className="mb-1 block text-[13px] text-soft">Family</span>
          <select value={family} onChange={(event) => setFamily(event.target.value as Family)} className={FIELD}>
            {FAMILIES.map((one) => (
              <option key={one} value={one}>
                {FAMILY_WORDS[one]}
              </option>
            ))}
          </select>
        </label>
        <Button type="submit" disabled={name.trim() === ''}>
          Add
        </Button>
      </form>
      <HearingCaution className="mt-5 max-w-[80ch] border-l-2 border-hair pl-4" />
    </section>
  );
}
