/** Settings of ours, none with a source; seconds, decibels, factors. */
export const PLAYER = {
  /** from the call of `play` to the first moment of the passage */
  lead: 0.08,
  /** how far ahead strokes are handed to the audio clock: a page busy for less loses nothing */
  lookAhead: 0.5,
  /** from a change of speed, passage or piece to its effect */
  changeAhead: 0.02,
  /** a stroke that is later than this is left out rather than misplaced */
  tooLate: 0.02,
  /** in which sound is turned on or off without a click */
  ramp: 0.02,
  /** the longest that a sound rings */
  longestSound: 6,
  /** how long the browser may take to let sound begin */
  patience: 3,
  startVolume: -18,
  quietest: -60,
  slowest: 0.1,
  fastest: 4,
} as const;
