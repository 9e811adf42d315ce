import type { PrintStaff } from '../../print/types';
import type { Instrument } from '../../study/schema';
import { percussionKeys, soundName } from './gm-percussion';
import { element, textElement } from './xml';

/** Ids of the MusicXML sounds list (sounds.xml, MusicXML 4.0). What it does not have is left without one. */
const SOUNDS: Readonly<Record<string, string>> = {
  'bass-drum': 'drum.bass-drum',
  'snare-drum': 'drum.snare-drum',
  'tom-tom': 'drum.tom-tom',
  conga: 'drum.conga',
  bongo: 'drum.bongo',
  timpani: 'drum.timpani',
  'frame-drum': 'drum.frame-drum',
  tambourine: 'drum.tambourine',
  triangle: 'metal.triangle',
  crotale: 'metal.crotales',
  glockenspiel: 'pitched-percussion.glockenspiel',
  'finger-cymbal': 'metal.cymbal.finger',
  cymbal: 'metal.cymbal.suspended',
  'tam-tam': 'metal.tamtam',
  gong: 'metal.gong',
  cowbell: 'metal.bells.cowbell',
  'brake-drum': 'metal.brake-drums',
  anvil: 'metal.anvil',
  'sleigh-bell': 'metal.bells.sleigh-bells',
  'temple-block': 'wood.temple-block',
  'wood-block': 'wood.wood-block',
  clave: 'wood.claves',
  'log-drum': 'drum.log-drum',
  castanet: 'wood.castanets',
  marimba: 'pitched-percussion.marimba',
  xylophone: 'pitched-percussion.xylophone',
};

export const musicXmlSound = ({ sound, id, name }: Instrument): string | undefined => [sound, id, name].map((one) => (one === undefined ? undefined : SOUNDS[soundName(one)])).find((found) => found !== undefined);

export type ScoreInstrument = { readonly id: string; readonly instrument: Instrument; readonly sound: number; readonly key: number };

/** One entry for each sound of each instrument of a part. */
export function scoreInstruments(part: string, { instruments }: PrintStaff): ScoreInstrument[] {
  let count = 0;
  return instruments.flatMap((instrument) =>
    percussionKeys(instrument, instrument.sounds ?? 1).map((key, index): ScoreInstrument => ({ id: `${part}-I${(count += 1)}`, instrument, sound: index + 1, key })),
  );
}

/** The part's entry in the list: its instruments by name, and how MIDI plays them. */
export function scorePart(part: string, name: string, instruments: readonly ScoreInstrument[]): string {
  return element(
    'score-part',
    { id: part },
    textElement('part-name', name),
    ...instruments.map(({ id, instrument }) => {
      const sound = musicXmlSound(instrument);
      return element('score-instrument', { id }, textElement('instrument-name', instrument.name), sound === undefined ? '' : textElement('instrument-sound', sound));
    }),
    // Numbers count from 1: MIDI's key 38 is 39 here.
    ...instruments.map(({ id, key }) => element('midi-instrument', { id }, textElement('midi-channel', 10), textElement('midi-unpitched', key + 1))),
  );
}
