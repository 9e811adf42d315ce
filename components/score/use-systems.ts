'use client';

import { useCallback, useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import { type BreakOptions, breakSystems } from './layout';
import type { DrawnScore, SystemSpec } from './spec';

/** Systems that are there at once; the rest of a long score follows while the page is already shown. */
const AT_ONCE = 24;
const SLICE_MILLISECONDS = 12;

/** The systems of a score, broken a few at a time where there are many. */
class SystemStore {
  private systems: readonly SystemSpec[];
  private readonly source: Generator<SystemSpec, void, void>;
  private readonly listeners = new Set<() => void>();
  private isDone = false;

  constructor(
    score: DrawnScore,
    width: number,
    options: BreakOptions,
    atOnce: number,
    private readonly onDone: () => void,
  ) {
    this.source = breakSystems(score, width, options);
    this.systems = this.take((taken) => taken >= atOnce);
  }

  readonly get = (): readonly SystemSpec[] => this.systems;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** @returns ends it */
  goOn(): () => void {
    let timer: ReturnType<typeof setTimeout> | null = null;
    const slice = (): void => {
      const end = performance.now() + SLICE_MILLISECONDS;
      this.systems = [...this.systems, ...this.take(() => performance.now() >= end)];
      if (this.isDone) for (const listener of [...this.listeners]) listener();
      else timer = setTimeout(slice);
    };
    if (!this.isDone) timer = setTimeout(slice);
    return () => {
      if (timer !== null) clearTimeout(timer);
    };
  }

  private take(isEnough: (taken: number) => boolean): SystemSpec[] {
    const taken: SystemSpec[] = [];
    while (!isEnough(taken.length)) {
      const { done, value } = this.source.next();
      if (done) {
        this.isDone = true;
        this.onDone();
        break;
      }
      taken.push(value);
    }
    return taken;
  }
}

/** Makes a few systems at once for a score that opens, and all for one that was there before. */
class SystemMaker {
  private isOpen = false;

  make(score: DrawnScore, width: number, options: BreakOptions): SystemStore {
    return new SystemStore(score, width, options, this.isOpen ? Infinity : AT_ONCE, () => {
      this.isOpen = true;
    });
  }
}

const NOTHING: readonly SystemSpec[] = [];

/**
 * A score broken into systems of a width; none while the width is not known. The first are there at once and the rest follow;
 * once all have been there, a changed score has all of them at once, so that what is being looked at stays.
 */
export function useSystems(score: DrawnScore, width: number, { hideSilent, namesBeneath, words }: BreakOptions): readonly SystemSpec[] {
  const [maker] = useState(() => new SystemMaker());
  const store = useMemo(() => (width <= 0 ? null : maker.make(score, width, { hideSilent, namesBeneath, words })), [maker, score, width, hideSilent, namesBeneath, words]);
  useEffect(() => store?.goOn(), [store]);
  const subscribe = useCallback((listener: () => void) => store?.subscribe(listener) ?? (() => undefined), [store]);
  return useSyncExternalStore(subscribe, () => store?.get() ?? NOTHING, () => NOTHING);
}
