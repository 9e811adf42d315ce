import { EngineError } from '../errors';
import { formatFraction, toFactor, toFraction } from '../exact/fraction';
import type { Rhythm, Value } from '../rhythm/types';
import { stepWords } from '../describe/sentence-parts';
import { augment } from '../transform/augment';
import { retrograde } from '../transform/retrograde';
import { rotate } from '../transform/rotate';
import { type Step, applySteps } from '../transform/steps';
import type { Mistake } from './types';

/** What somebody would have written who misread one step: the rhythm, the mistake, and what was asked. */
export type Misreading = { readonly code: Mistake; readonly rhythm: Rhythm; readonly what: string };

type Change = { readonly code: Mistake; readonly what: string; readonly apply: (rhythm: Rhythm) => Rhythm };

const only = (kind: boolean, rhythm: Rhythm, change: (value: Value) => Value): Rhythm => rhythm.map((value) => (value.rest === kind ? change(value) : value));

function stretchChanges(step: Extract<Step, { kind: 'augment' | 'diminish' }>): Change[] {
  const asked = step.kind === 'augment' ? toFactor(step.factor) : toFactor(step.factor).inverse();
  const times = (value: Value): Value => ({ ...value, length: value.length.mul(asked) });
  const what = `every value was to last ${formatFraction(asked)} of its length`;
  return [
    { code: 'factor-inverted', what, apply: (rhythm) => augment(rhythm, asked.inverse()) },
    { code: 'rests-not-stretched', what, apply: (rhythm) => only(false, rhythm, times) },
    { code: 'only-rests-stretched', what, apply: (rhythm) => only(true, rhythm, times) },
    { code: 'not-stretched', what, apply: (rhythm) => rhythm },
  ];
}

function reversalChanges({ by }: Extract<Step, { kind: 'retrograde' }>): Change[] {
  const what = `its ${by} were to be reversed`;
  return [
    { code: 'not-reversed', what, apply: (rhythm) => rhythm },
    by === 'values'
      ? { code: 'reversed-by-attacks', what, apply: (rhythm) => retrograde(rhythm, 'attacks') }
      : { code: 'reversed-by-values', what, apply: (rhythm) => retrograde(rhythm, 'values') },
  ];
}

function rotationChanges(step: Extract<Step, { kind: 'rotate' }>): Change[] {
  const { steps, by } = step;
  const what = `it was to be ${stepWords(step)}`;
  const one = Math.sign(steps) || 1;
  const others: Change[] =
    by === 'values'
      ? [{ code: 'rotated-by-attacks', what, apply: (rhythm) => rotate(rhythm, steps, 'attacks') }]
      : [{ code: 'rotated-by-values', what, apply: (rhythm) => rotate(rhythm, steps, 'values') }];
  return [
    { code: 'rotated-the-wrong-way', what, apply: (rhythm) => rotate(rhythm, -steps, by) },
    { code: 'rotated-too-far', what, apply: (rhythm) => rotate(rhythm, steps + one, by) },
    { code: 'rotated-too-little', what, apply: (rhythm) => rotate(rhythm, steps - one, by) },
    { code: 'not-rotated', what, apply: (rhythm) => rhythm },
    ...others,
  ];
}

function additionChanges({ amount }: Extract<Step, { kind: 'add' }>): Change[] {
  const by = toFraction(amount);
  const what = `every attack was to be ${by.s < 0n ? 'shorter' : 'longer'} by ${formatFraction(by.abs())}`;
  return [
    { code: 'taken-away-instead', what, apply: (rhythm) => applySteps(rhythm, [{ kind: 'add', amount: by.neg() }]) },
    { code: 'added-to-rests', what, apply: (rhythm) => rhythm.map((value) => ({ ...value, length: value.length.add(by) })) },
    { code: 'not-added', what, apply: (rhythm) => rhythm },
  ];
}

function changesOf(step: Step): Change[] {
  switch (step.kind) {
    case 'augment':
    case 'diminish':
      return stretchChanges(step);
    case 'retrograde':
      return reversalChanges(step);
    case 'rotate':
      return rotationChanges(step);
    case 'add':
      return additionChanges(step);
  }
}

/** Chains of more steps are not tried in other orders. */
const MOST_ORDERED = 4;

function orders<T>(items: readonly T[]): T[][] {
  if (items.length < 2) return [[...items]];
  return items.flatMap((item, index) => orders(items.toSpliced(index, 1)).map((rest) => [item, ...rest]));
}

/** Tries a rhythm; what no rhythm can be is left out. */
function attempt(make: () => Rhythm): Rhythm | null {
  try {
    const rhythm = make();
    return rhythm.every(({ length }) => length.s > 0n && length.n > 0n) ? rhythm : null;
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
}

/** Every recognised way to misread a chain of steps, one step at a time, with what comes of it. */
export function misreadings(subject: Rhythm, steps: readonly Step[]): Misreading[] {
  const found: Misreading[] = [];
  const add = (code: Mistake, what: string, make: () => Rhythm): void => {
    const rhythm = attempt(make);
    if (rhythm !== null) found.push({ code, what, rhythm });
  };
  if (steps.length > 0) add('nothing-done', 'the subject was to be changed', () => subject);
  steps.forEach((step, index) => {
    for (const { code, what, apply } of changesOf(step)) {
      add(code, steps.length > 1 ? `in step ${index + 1} ${what}` : what, () => applySteps(apply(applySteps(subject, steps.slice(0, index))), steps.slice(index + 1)));
    }
  });
  if (steps.length > 1 && steps.length <= MOST_ORDERED) {
    const asked = steps.map(stepWords).join(', then ');
    for (const order of orders(steps).slice(1)) add('steps-in-another-order', `the steps were to be taken in this order: ${asked}`, () => applySteps(subject, order));
  }
  return found;
}
