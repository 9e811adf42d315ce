import { buildStudy, clockOf, EngineError, type Family, metreOf, parseMetre, type Statement, type Study } from '../engine';

/** A part of a section's small picture: from and to are 0 to 1 within the section. */
export type StripPart = { readonly from: number; readonly to: number; readonly family: Family };
/** A section's small picture; `share` is its part of the whole length, 0 to 1. */
export type StripSection = { readonly share: number; readonly parts: StripPart[] };

/** What lists show of a study, worked out when it is saved. */
export type StudyFigures = {
  /** exact, as a mixed number: `77`, `12 1/2`; each section counted in its own metre */
  readonly measures: string;
  /** rounded once, from the exact length */
  readonly seconds: number;
  readonly strip: StripSection[];
};

/** More parts than this in a whole strip are drawn together: a strip is a few hundred points wide. */
const MOST_PARTS = 240;
/** Gaps under this part of the whole are closed when parts are drawn together. */
const FINEST = 1 / 240;

const round = (share: number): number => Math.round(share * 100_000) / 100_000;

/** Parts of one family, in order, with narrow gaps closed. */
function merge(parts: readonly StripPart[], gap: number): StripPart[] {
  const families = [...new Set(parts.map(({ family }) => family))];
  return families.flatMap((family) => {
    const merged: StripPart[] = [];
    for (const part of parts.filter((one) => one.family === family).sort((a, b) => a.from - b.from)) {
      const last = merged.at(-1);
      if (last && part.from - last.to <= gap) merged[merged.length - 1] = { ...last, to: Math.max(last.to, part.to) };
      else merged.push(part);
    }
    return merged;
  });
}

function familyOf(statement: Statement, families: ReadonlyMap<string, Family>): Family {
  const instrument = statement.instrument ?? statement.assigned?.[0] ?? '';
  return families.get(instrument) ?? 'found';
}

/**
 * Builds a study and works out what lists show of it.
 * @throws EngineError where the study cannot be built, or lasts longer than can be counted
 */
export function studyFigures(study: Study): StudyFigures {
  const built = buildStudy(study);
  const seconds = clockOf(study, built).total.valueOf();
  if (!Number.isFinite(seconds)) throw new EngineError('too_large', 'This study lasts longer than can be counted in seconds. Make it shorter, or quicker.');
  const counts = study.sections.map((section, index) => built.sections[index]!.length.div(parseMetre(metreOf(study, section)).length));
  const measures = counts.slice(1).reduce((a, b) => a.add(b), counts[0]!).toFraction(true);

  const families = new Map(study.instruments.map(({ id, family }) => [id, family]));
  const bySection = new Map<string, Statement[]>(study.sections.map(({ id }) => [id, []]));
  for (const statement of built.statements) bySection.get(statement.section)?.push(statement);
  const total = built.totalLength.valueOf();
  const isCrowded = built.statements.length > MOST_PARTS;
  const strip = built.sections.map(({ id, start, length }): StripSection => {
    const [from, lasts] = [start.valueOf(), length.valueOf()];
    if (!(lasts > 0)) return { share: 0, parts: [] };
    const share = round(lasts / total);
    const parts = bySection.get(id)!.map((statement): StripPart => {
      const at = (statement.start.valueOf() - from) / lasts;
      return { from: round(at), to: round(at + statement.length.valueOf() / lasts), family: familyOf(statement, families) };
    });
    return { share, parts: isCrowded ? merge(parts, (FINEST * total) / lasts) : parts };
  });
  return { measures, seconds, strip };
}
