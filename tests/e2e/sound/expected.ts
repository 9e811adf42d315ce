import { Fraction, type Section, type Study, buildStudy, secondsOf } from '../../../engine';

export type Attack = { readonly seconds: Fraction; readonly lasts: Fraction; readonly roll: boolean };

function tempoIn(study: Study, section: Section): Study['tempo'] {
  if (section.tempo) return section.tempo;
  const source = section.kind === 'mirror' ? study.sections.find(({ id }) => id === section.of) : undefined;
  return source ? tempoIn(study, source) : study.tempo;
}

/** Every attack of each instrument in exact seconds, worked out from the statements by their tempo, not by the player's list. */
export function expectedAttacks(study: Study): Map<string, Attack[]> {
  const built = buildStudy(study);
  const attacks = new Map<string, Attack[]>(study.instruments.map(({ id }) => [id, []]));
  let before = new Fraction(0);
  study.sections.forEach((section, index) => {
    const tempo = tempoIn(study, section);
    for (const statement of built.statements.filter((one) => one.section === section.id)) {
      let at = statement.start.sub(built.sections[index]!.start);
      let number = 0;
      for (const value of statement.rhythm) {
        if (!value.rest) {
          const instrument = statement.assigned?.[number++] ?? statement.instrument ?? '';
          attacks.get(instrument)?.push({ seconds: before.add(secondsOf(at, tempo)), lasts: secondsOf(value.length, tempo), roll: value.roll === true });
        }
        at = at.add(value.length);
      }
    }
    before = before.add(secondsOf(built.sections[index]!.length, tempo));
  });
  for (const list of attacks.values()) list.sort((a, b) => a.seconds.compare(b.seconds));
  return attacks;
}
