import type { Instrument } from '../../study/schema';

/**
 * Keys of the General MIDI Level 1 percussion map (MMA0007/RP003), from the lowest sound to the highest. What the map does not
 * have (tam-tam, temple blocks, brake drum, anvil, found objects) is given the nearest it has: a choice of ours, no source.
 */
const KEYS: Readonly<Record<string, readonly number[]>> = {
  'bass-drum': [35, 36],
  'snare-drum': [38, 40],
  'tom-tom': [41, 43, 45, 47, 48, 50],
  conga: [64, 63, 62],
  bongo: [61, 60],
  timpani: [41, 43, 45, 47],
  'frame-drum': [45, 47],
  tambourine: [54],
  triangle: [80, 81],
  crotale: [81],
  glockenspiel: [81],
  'finger-cymbal': [53],
  cymbal: [57, 49, 55],
  'tam-tam': [52],
  gong: [52],
  cowbell: [56],
  'brake-drum': [53],
  anvil: [53],
  'sleigh-bell': [54],
  'temple-block': [77, 76],
  'wood-block': [77, 76],
  clave: [75],
  'log-drum': [77, 76],
  castanet: [75],
  plank: [77, 76],
  'flower-pot': [68, 67],
  bottle: [68, 67],
  pipe: [68, 67],
};

/** Twelve of each family, from the lowest to the highest as near as the map allows: a choice of ours, no source. */
const FAMILY: Readonly<Record<Instrument['family'], readonly number[]>> = {
  skin: [35, 36, 41, 43, 45, 47, 48, 50, 64, 63, 61, 60],
  wood: [64, 63, 61, 60, 77, 76, 66, 65, 68, 67, 37, 75],
  metal: [52, 57, 49, 59, 51, 55, 53, 56, 68, 67, 80, 81],
  found: [41, 43, 64, 63, 77, 76, 56, 68, 67, 37, 54, 75],
};

export const soundName = (text: string): string => text.trim().toLowerCase().replace(/[\s_]+/g, '-').replace(/s$/, '');

/** So many of a row, spread over the whole of it. */
const spread = (row: readonly number[], count: number): number[] =>
  Array.from({ length: count }, (_, n) => row[count === 1 ? Math.floor(row.length / 2) : Math.round((n * (row.length - 1)) / (count - 1))]!);

/**
 * A key for each sound of an instrument, 1 the lowest first: by the sound it names, else its id or name, else its family.
 * @param sounds - how many sounds it has, 1 to 12; no two share a key
 */
export function percussionKeys({ id, name, sound, family }: Instrument, sounds: number): number[] {
  const named = [sound, id, name].map((one) => (one === undefined ? undefined : KEYS[soundName(one)])).find((row) => row !== undefined);
  if (named !== undefined && named.length >= sounds) return sounds === 1 ? [named[0]!] : spread(named, sounds);
  return spread(FAMILY[family], Math.min(sounds, FAMILY[family].length));
}
