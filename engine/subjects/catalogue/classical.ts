import { figures } from './figure';

const PROSODY = 'L. Poeppel, decitala (MIT), corpora/Prosody/Meters/ProsodicMeters.csv, after Messiaen, Traité de rythme, vol. 1, annexe I, 133–144';
const FEET = 'the table of verse feet of de.wikipedia.org (Liste von Versfüßen, as translated at de.zxc.wiki)';

/** A long is two shorts, as the data set of L. Poeppel counts. */
export const CLASSICAL = [
  ...figures({ family: 'classical foot', unit: '1/8', source: FEET }, [
    ['pyrrhic', '1 1'],
    ['iamb', '1 2'],
    ['trochee', '2 1'],
    ['spondee', '2 2'],
    ['tribrach', '1 1 1'],
    ['dactyl', '2 1 1'],
    ['amphibrach', '1 2 1'],
    ['anapaest', '1 1 2'],
    ['bacchius', '1 2 2'],
    ['cretic, amphimacer', '2 1 2'],
    ['antibacchius', '2 2 1'],
    ['molossus', '2 2 2'],
    ['proceleusmatic', '1 1 1 1'],
    ['paeon I', '2 1 1 1'],
    ['paeon II', '1 2 1 1'],
    ['paeon III', '1 1 2 1'],
    ['paeon IV', '1 1 1 2', PROSODY],
    ['choriamb', '2 1 1 2', 'from memory'],
    ['ionic major', '2 2 1 1', PROSODY],
    ['ionic minor', '1 1 2 2', PROSODY],
  ]),
  ...figures({ family: 'classical metre', unit: '1/8', source: PROSODY }, [
    ['dactylic hexameter', '2 1 1 2 1 1 2 1 1 2 1 1 2 1 1 2 2'],
    ['bacchiac tetrameter', '1 2 2 1 2 2 1 2 2 1 2 2'],
  ]),
];
