import { figures } from './figure';

export const OTHERS = [
  ...figures({ family: 'clapping pattern', unit: '1/8', source: 'Reich, Clapping Music (1972); G. Haack, College Math. J. 22(3), 1991, 224–227' }, [
    ['twelve-pulse clapping pattern', '1 1 1 (1) 1 1 (1) 1 (1) 1 1 (1)'],
  ]),
  ...figures({ family: 'proportion canon', unit: '1/8', source: 'F. Ouseley, “Augmentation”, in Grove, A Dictionary of Music and Musicians (1879–89): Cooke’s canon by double augmentation' }, [
    ['Cooke’s canon, quickest voice', '3 1 2 2'],
    ['Cooke’s canon, middle voice', '6 2 4 4'],
    ['Cooke’s canon, slowest voice', '12 4 8 8'],
  ]),
  ...figures({ family: 'tiling canon', unit: '1/8', source: 'recomputed; E. Amiot, from memory' }, [
    ['0 1 4, which tiles fifteen pulses with its double', '1 3 1'],
    ['Vuza canon of 72 pulses, inner rhythm', '3 3 6 11 4 9 6 5 1 3 20 1', 'D. T. Vuza, from memory; verified to tile with entries at 0 8 10 18 26 64'],
  ]),
  ...figures({ family: 'Fibonacci rhythm', unit: '1/8', source: 'Bartók, Music for Strings, Percussion and Celesta, III' }, [
    ['xylophone, nine values', '1 2 3 5 8 5 3 2 1', 'Bartók, Music for Strings, Percussion and Celesta, III, as printed at robertfrostsbanjo.blogspot.com'],
    ['xylophone, eleven values', '1 1 2 3 5 8 5 3 2 1 1', 'Bartók, Music for Strings, Percussion and Celesta, III, from memory'],
  ]),
];
