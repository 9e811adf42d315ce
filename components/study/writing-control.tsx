'use client';

import { useMemo } from 'react';
import { type Section, type Writing, compareWritings, legibilityWords, writingOf } from '@/engine';
import { setWriting } from '@/lib/client/study-edits';
import { Token } from '../ui/token';
import { attempt, useStudy } from './context';

const WORDS: Record<Writing, string> = { values: 'longer values', tempo: 'new tempos', metre: 'new metres' };

function Ways({ section }: { section: Section }) {
  const { editor, state } = useStudy();
  const { study, built } = state;
  const choices = useMemo(() => compareWritings(study, built, section.id), [study, built, section.id]);
  const now = writingOf(study, section);
  return (
    <fieldset>
      <legend className="sr-only">How stretches are written</legend>
      {choices.map((choice) => (
        <label key={choice.writing} className="flex cursor-pointer items-baseline gap-2.5 py-1.5">
          <input
            type="radio"
            name={`writing-${section.id}`}
            disabled={'refused' in choice}
            checked={choice.writing === now}
            onChange={() => attempt(editor, () => setWriting(section.id, choice.writing))}
            className="accent-ink"
          />
          <span>
            {WORDS[choice.writing]}
            {'isEasiest' in choice && choice.isEasiest && <b className="font-semibold">, easiest to read</b>}
            <span className="block max-w-72 text-[13px] text-soft">{'refused' in choice ? choice.refused : legibilityWords(choice.legibility)}</span>
          </span>
        </label>
      ))}
      <p className="mt-1 max-w-72 text-[13px] text-soft">All sound the same.</p>
    </fieldset>
  );
}

/** How stretches are written in this section: longer values, new tempos or new metres, with what each asks of a reader. */
export function WritingControl({ section }: { section: Section }) {
  const { state } = useStudy();
  return (
    <Token text={`Written in ${WORDS[writingOf(state.study, section)]}`} label="How stretches are written" className="border-b! font-normal! text-[14px]!">
      {() => <Ways section={section} />}
    </Token>
  );
}
