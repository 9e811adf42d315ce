import { type Row, figures } from './figure';

const PAPER = 'G. Toussaint, “The Euclidean algorithm generates traditional musical rhythms”, Proc. BRIDGES, Banff 2005, 47–56';

/** Gaps between attacks, as the paper's pattern has them. */
const PATTERNS: readonly Row[] = [
  ['E(2,3), West Africa, Latin America', '2 1'],
  ['E(2,5), Khafif-e-ramal', '2 3'],
  ['E(3,4), Cumbia, Calypso', '2 1 1'],
  ['E(3,5), Rumanian and Persian necklaces', '2 2 1'],
  ['E(3,7), Ruchenitza', '2 2 3'],
  ['E(3,8), tresillo', '3 3 2'],
  ['E(4,7), Ruchenitza', '2 2 2 1'],
  ['E(4,9), Aksak', '2 2 2 3'],
  ['E(5,6), York-Samai', '2 1 1 1 1'],
  ['E(5,7), Nawakhat', '2 1 2 1 1'],
  ['E(5,8), cinquillo', '2 1 2 1 2'],
  ['E(5,9), Agsag-Samai', '2 2 2 2 1'],
  ['E(5,11)', '2 2 2 2 3'],
  ['E(5,16), bossa-nova necklace', '3 3 3 3 4'],
  ['E(7,8), Tuareg', '2 1 1 1 1 1 1'],
  ['E(7,12), West African bell', '2 1 2 2 1 2 2'],
  ['E(11,24), Aka', '3 2 2 2 2 3 2 2 2 2 2'],
  ['E(5,16) from its third attack, bossa nova as played', '3 3 4 3 3'],
  ['E(7,16) from its last attack, samba as played', '2 3 2 2 3 2 2'],
  ['E(5,13)', '3 2 3 2 3', 'E. Bjorklund, “The theory of rep-rate pattern generation in the SNS timing system”, SNS Tech note, 2003'],
];

export const EUCLIDEAN = figures({ family: 'Euclidean rhythm', unit: '1/8', source: PAPER }, PATTERNS);
