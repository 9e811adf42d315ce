/** How a print is laid out. */
export type PageOptions = {
  readonly paper: 'a4' | 'letter';
  readonly orientation: 'portrait' | 'landscape';
  /** height of a five-line staff, in millimetres */
  readonly staff: number;
  /** said at the foot of each page: which version, of when */
  readonly stamp?: string;
};

/** Staff heights that are offered, in millimetres: 4 is small for a score, 7 and 8 are usual in parts (from memory). */
export const STAFF_SIZES = { least: 4, most: 8, score: 5.5, part: 7 } as const;

/** ISO 216 (A4) and ANSI/ASME Y14.1 (Letter), in points. */
const PAPERS = { a4: { short: 595.28, long: 841.89 }, letter: { short: 612, long: 792 } } as const;
/** Millimetres, a default of ours. */
const MARGIN = { side: 15, top: 14, foot: 16 } as const;
const POINTS = 72 / 25.4;

export type PageGeometry = {
  /** points */
  readonly paper: { readonly width: number; readonly height: number };
  /** drawing units, ten a staff space */
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
};

export function pageGeometry({ paper, orientation, staff }: PageOptions): PageGeometry {
  const { short, long } = PAPERS[paper];
  const size = orientation === 'portrait' ? { width: short, height: long } : { width: long, height: short };
  const units = (points: number): number => (points * 40) / (staff * POINTS);
  const side = units(MARGIN.side * POINTS);
  return {
    paper: size,
    width: units(size.width),
    height: units(size.height),
    left: side,
    right: units(size.width) - side,
    top: units(MARGIN.top * POINTS),
    bottom: units(size.height) - units(MARGIN.foot * POINTS),
  };
}
