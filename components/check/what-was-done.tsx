'use client';

import { useMemo } from 'react';
import { EngineError, type NearestTransformation, type Transformation, findTransformations, formatFraction, listWords, nearestTransformation } from '@/engine';
import { readRhythm } from './answer-check';
import { TextField } from './text-field';

const REVERSED = { values: 'its values reversed', attacks: 'its attacks reversed' } as const;

/** One transformation in words, in the order in which its parts are done. */
export function transformationWords({ factor, retrograde, rotation }: Transformation): string {
  const parts = [
    ...(factor.equals(1) ? [] : [`stretched ${formatFraction(factor)} times`]),
    ...(retrograde === false ? [] : [REVERSED[retrograde]]),
    ...(rotation === 0 ? [] : [`rotated by ${rotation} ${rotation === 1 ? 'value' : 'values'}`]),
  ];
  return parts.length === 0 ? 'nothing was done' : parts.join(', then ');
}

function nearestWords({ ratios, stretch }: NearestTransformation): string[] {
  const words = ratios.map((ratio, index) => (ratio === null ? `value ${index + 1} has no counterpart` : `value ${index + 1} is ${formatFraction(ratio)} of it`));
  const sentences = [`No one transformation gives it. Value by value: ${listWords(words.slice(0, 24))}${words.length > 24 ? ' and so on' : ''}.`];
  if (stretch) {
    const how = transformationWords({ factor: stretch.factor, retrograde: stretch.retrograde, rotation: 0 });
    sentences.push(`The longest stretch that one does explain: values ${stretch.to + 1} to ${stretch.to + stretch.length}, ${how}.`);
  }
  return sentences;
}

type Found = { readonly exact: Transformation[] } | { readonly nearest: string[] } | { readonly problem: string } | null;

function find(from: string, to: string): Found {
  const [a, b] = [readRhythm(from), readRhythm(to)];
  if (a === null || b === null) return null;
  try {
    const exact = findTransformations(a, b);
    return exact.length > 0 ? { exact } : { nearest: nearestWords(nearestTransformation(a, b)) };
  } catch (error) {
    if (error instanceof EngineError) return { problem: error.message };
    throw error;
  }
}

/** Two rhythms: what turns the first into the second, or what comes nearest to it. */
export function WhatWasDone({ from, to, metre, set }: { from: string; to: string; metre: string; set: (change: { from?: string; to?: string }) => void }) {
  const found = useMemo(() => find(from, to), [from, to]);
  return (
    <>
      <div className="mt-6 grid gap-6">
        <TextField label="First rhythm" value={from} metre={metre} onChange={(text) => set({ from: text })} />
        <TextField label="Second rhythm" value={to} metre={metre} onChange={(text) => set({ to: text })} />
      </div>
      {found && (
        <section aria-labelledby="found" className="mt-8 border-t border-ink pt-6">
          <h2 id="found" className="text-[20px] font-[580]">
            From the first to the second
          </h2>
          <div role="status" className="mt-2 max-w-[76ch]">
            {'problem' in found && <p className="text-mark">{found.problem}</p>}
            {'exact' in found && (
              <ol className="list-decimal pl-5">
                {found.exact.map((one) => (
                  <li key={transformationWords(one)} className="py-0.5">
                    {transformationWords(one)}
                  </li>
                ))}
              </ol>
            )}
            {'nearest' in found && found.nearest.map((sentence) => <p key={sentence} className="mt-1 [overflow-wrap:anywhere]">{sentence}</p>)}
          </div>
        </section>
      )}
    </>
  );
}
