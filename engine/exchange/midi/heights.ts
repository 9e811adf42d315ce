/**
 * Keys of the General MIDI percussion map from the lowest sound to the highest: of a pair the map itself says which is the lower
 * (61 low bongo, 60 high bongo), the rest is an order of ours, no source. `percussionKeys` writes in the same order.
 */
const ORDER: readonly number[] = [
  35, 36, 38, 40, 41, 43, 45, 47, 48, 50, 64, 63, 62, 61, 60, 77, 76, 66, 65, 42, 44, 46, 52, 57, 49, 59, 51, 55, 53, 56, 68, 67, 37, 39, 54, 58, 69, 70, 74, 73, 79, 78, 72, 71, 75, 80, 81,
];

const heightOf = (key: number): number => {
  const place = ORDER.indexOf(key);
  return place === -1 ? (key < ORDER[0]! ? key - 128 : key + 128) : place;
};

/** The lower sound first. */
export const byHeight = (a: number, b: number): number => heightOf(a) - heightOf(b);
