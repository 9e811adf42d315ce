'use client';

import { describeStatement, endWords, formatFraction, readingWords, statementEnds } from '@/engine';
import { useStudy } from './context';
import { tint } from './family';

/** Every statement of the chosen section in a plain sentence, for reading and for screen readers. */
export function StatementTable() {
  const { state, selection, select } = useStudy();
  const { study, built } = state;
  const own = built.statements.filter((s) => s.section === selection.section);
  // Only what ends inside a measure is worth a word.
  const ends = new Map(statementEnds(study, built, state.measures).filter(({ within }) => !within.equals(1)).map((end) => [end.statement.id, endWords(end)]));
  return (
    <section aria-labelledby="statements-heading" className="mt-10 min-w-0">
      <h2 id="statements-heading" className="mb-2 text-[15px] font-semibold">
        Statements in words
      </h2>
      <ol className="border-t border-hair" role="list">
        {own.map((statement) => (
          <li key={statement.id} className="border-b border-hair">
            <button
              type="button"
              aria-pressed={selection.statement === statement.id}
              onClick={() => select({ statement: statement.id, scroll: true })}
              className="flex w-full items-baseline gap-3 py-2 text-left hover:bg-wash aria-pressed:font-semibold"
            >
              <span aria-hidden className="inline-block h-2.5 w-2.5 shrink-0 translate-y-px" style={{ background: tint(study, statement.instrument) }} />
              <span>
                {describeStatement(state, statement)}
                {ends.has(statement.id) && <span className="text-soft">{` It ${ends.get(statement.id)}.`}</span>}
              </span>
            </button>
          </li>
        ))}
      </ol>
      <span className="sr-only" aria-live="polite">
        {own
          .filter(({ id }) => id === selection.statement)
          .map((statement) => `Chosen: times ${formatFraction(statement.factor)}, ${readingWords(statement.reading)}`)
          .join()}
      </span>
    </section>
  );
}
