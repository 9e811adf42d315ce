import { type Row, figures } from './figure';

const RULE = 'J. Schillinger, The Schillinger System of Musical Composition (1946), Book I';

const STRINGS: readonly Row[] = [
  ['2 against 1', '1 1'],
  ['3 against 2', '2 1 1 2'],
  ['4 against 3', '3 1 2 2 1 3'],
  ['5 against 2', '2 2 1 1 2 2'],
  ['5 against 3', '3 2 1 3 1 2 3'],
  ['5 against 4', '4 1 3 2 2 3 1 4'],
  ['6 against 5', '5 1 4 2 3 3 2 4 1 5'],
  ['7 against 2', '2 2 2 1 1 2 2 2'],
  ['7 against 3', '3 3 1 2 3 2 1 3 3'],
  ['7 against 4', '4 3 1 4 2 2 4 1 3 4'],
  ['7 against 5', '5 2 3 4 1 5 1 4 3 2 5'],
  ['7 against 6', '6 1 5 2 4 3 3 4 2 5 1 6'],
  ['8 against 3', '3 3 2 1 3 3 1 2 3 3'],
  ['8 against 5', '5 3 2 5 1 4 4 1 5 2 3 5'],
  ['8 against 7', '7 1 6 2 5 3 4 4 3 5 2 6 1 7'],
  ['9 against 2', '2 2 2 2 1 1 2 2 2 2'],
  ['9 against 4', '4 4 1 3 4 2 2 4 3 1 4 4'],
  ['9 against 5', '5 4 1 5 3 2 5 2 3 5 1 4 5'],
  ['9 against 7', '7 2 5 4 3 6 1 7 1 6 3 4 5 2 7'],
  ['9 against 8', '8 1 7 2 6 3 5 4 4 5 3 6 2 7 1 8'],
  ['3 against 2, fractioned', '2 1 1 1 1 1 2', `${RULE}: the rule from memory, recomputed`],
  ['4 against 3, fractioned', '3 1 2 1 1 1 1 2 1 3', `${RULE}: the rule from memory, recomputed`],
  ['5 against 4, fractioned', '4 1 3 1 1 2 1 2 1 1 3 1 4', `${RULE}: the rule from memory, recomputed`],
  ['2 against 3 against 5', '2 1 1 1 1 2 1 1 2 2 1 1 2 2 1 1 2 1 1 1 1 2', `${RULE}: the rule, recomputed for three`],
];

export const RESULTANTS = figures({ family: 'resultant', unit: '1/8', source: `${RULE}: the rule; the string from memory, recomputed` }, STRINGS);
