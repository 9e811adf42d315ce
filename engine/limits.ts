/**
 * Every limit of the engine, in one place. Beyond them the engine refuses with `EngineError`, naming the limit.
 * They are settings of ours, chosen so that the longest allowed piece still opens in a browser; none is a rule of the trade.
 */
export const LIMITS = {
  /** characters of one rhythm text */
  rhythmTextLength: 1_000_000,
  /** values of one rhythm, repeats written out */
  rhythmValues: 120_000,
  /** repeats in `[ … ]xN` */
  repeatCount: 10_000,
  /** numerator and denominator of one typed length */
  fractionTerm: 1_000_000_000,
  /** common denominator of lengths that are counted together: whole ticks stay exact in a plain number */
  commonDenominator: Number.MAX_SAFE_INTEGER,
  /** digits of the common denominator of lengths that are added, but not counted on one grid */
  sumDigits: 200,
  /** characters of one typed fraction */
  fractionText: 64,
  /** greatest and least factor of an augmentation (its inverse) */
  factor: 1_000,
  /** statements of one section */
  statements: 256,
  /** sections of a study */
  sections: 200,
  /** steps of one chain of transformations */
  steps: 32,
  instruments: 64,
  players: 64,
  subjects: 64,
  /** lines of one free section, or under a section */
  lines: 64,
  /** values of a whole study, all statements and lines together */
  studyValues: 400_000,
  /** measures of one line */
  measures: 60_000,
  /** beats of a metre, its groups added */
  metreBeats: 64,
  /** greatest beat unit of a metre (a 64th) */
  metreUnit: 64,
  /** the shortest symbol that is written */
  shortestSymbol: 256,
  /** marks on the attacks of one rhythm */
  marks: 1_024,
  /** sound numbers of one instrument */
  sounds: 12,
  /** length of a title or a name */
  name: 200,
  /** length of an id */
  id: 64,
  /** pulses of a Euclidean rhythm, and of a resultant's generators */
  pulses: 1_024,
  /** lengths of a ladder or an alignment */
  lengths: 1_024,
  /** places, attacks and values that a search for subjects may combine */
  subjectStates: 2_000_000,
  /** pulses that a search through sets of attacks may look at */
  subjectSteps: 2_000_000,
  /** sets of attacks that are gone through once one is found */
  subjectSets: 2_000,
  /** bytes of a file of music, as it comes */
  musicBytes: 32 * 1024 * 1024,
  /** bytes of a compressed file's score, unpacked */
  unpackedBytes: 64 * 1024 * 1024,
  /** bytes of a compressed file's table of contents, unpacked */
  containerBytes: 64 * 1024,
  /** how many times its packed size a score may become, beyond the first megabyte */
  unpackRatio: 250,
  /** entries of a compressed file */
  zipEntries: 1_000,
  /** elements of MusicXML inside each other */
  xmlDepth: 64,
  /** elements of a whole MusicXML file */
  xmlElements: 2_000_000,
  /** elements of one note, direction or set of attributes */
  xmlNodes: 20_000,
  /** attributes of one element */
  xmlAttributes: 64,
  /** characters of one text, attribute, comment or declaration */
  xmlPiece: 1_000_000,
  /** events of a MIDI file */
  midiEvents: 2_000_000,
  /** parts, voices and tracks found in one file */
  candidates: 256,
} as const;
