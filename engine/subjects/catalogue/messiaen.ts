import { type Row, figures } from './figure';

const TABLE = 'Messiaen, Technique de mon langage musical (1944), ch. IV, exx. 23–24, as a commentary gives it: the factor; the values recomputed';
const PAIRS = 'A. Feron, “Rythmes rétrogradables et non rétrogradables”, universalis.fr';
const COMMENTARY = 'a commentary on Messiaen, Technique de mon langage musical';

/** Long, short, long, 1/4 1/8 1/4, under each factor of the table. */
const WORKED: readonly Row[] = [
  ['long, short, long', '1/4 1/8 1/4'],
  ['a quarter of each value added, × 5/4', '5/16 5/32 5/16'],
  ['a third added, × 4/3', '1/3 1/6 1/3'],
  ['the dot added, × 3/2', '3/8 3/16 3/8'],
  ['the value added to itself, × 2', '1/2 1/4 1/2'],
  ['twice the value added, × 3', '3/4 3/8 3/4'],
  ['three times the value added, × 4', '1 1/2 1'],
  ['four times the value added, × 5', '5/4 5/8 5/4'],
  ['a fifth taken away, × 4/5', '1/5 1/10 1/5'],
  ['a quarter taken away, × 3/4', '3/16 3/32 3/16'],
  ['the dot withdrawn, × 2/3', '1/6 1/12 1/6'],
  ['half taken away, × 1/2', '1/8 1/16 1/8'],
  ['two thirds taken away, × 1/3', '1/12 1/24 1/12'],
  ['three quarters taken away, × 1/4', '1/16 1/32 1/16'],
  ['four fifths taken away, × 1/5', '1/20 1/40 1/20'],
];

export const MESSIAEN = [
  ...figures({ family: 'Messiaen’s augmentations', unit: '1', source: TABLE }, WORKED),
  ...figures({ family: 'rhythm of Messiaen', unit: '1/16', source: PAIRS }, [
    ['retrogradable', '4 1 4 4'],
    ['retrogradable, reversed', '4 4 1 4'],
    ['nonretrogradable', '4 1 1 4'],
    ['Râgavardhana as Messiaen reads it', '4 4 4 2 3 2', `${COMMENTARY} (ch02-ragavardhana-analysis)`],
    ['Danse de la fureur, nonretrogradable', '3 5 8 5 3', 'Messiaen, Quatuor pour la fin du Temps (1941), VI, from memory'],
    ['Danse de la fureur, nonretrogradable, second', '4 3 7 3 4', 'Messiaen, Quatuor pour la fin du Temps (1941), VI, from memory'],
  ]),
  ...figures({ family: 'talea', unit: '1/16', source: 'Messiaen, Quatuor pour la fin du Temps (1941), I, as a public analysis divides it (vdoc.tips, “Messiaen chords”)' }, [
    // Râgavardhana turned about, Candrakalâ halved, Lakskmîça doubled: 17 values in 13 quarters
    ['Liturgie de cristal, piano', '4 4 4 2 3 2 2 2 2 3 3 3 1 2 3 4 8'],
  ]),
];
