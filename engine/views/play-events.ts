import { type Fraction, ZERO } from '../exact/fraction';
import type { Study } from '../study/schema';
import type { BuiltStudy } from '../study/types';
import { clockOf } from './clock';
import type { PlayEvent } from './types';

/**
 * Every attack of a study in order of time, in exact seconds at the written tempo.
 * @param built - what `buildStudy` gives for the same study
 */
export function playEvents(study: Study, built: BuiltStudy): PlayEvent[] {
  const clock = clockOf(study, built);
  const spanOf = new Map(built.sections.map((section, index) => [section.id, clock.spans[index]!]));
  const events: PlayEvent[] = [];
  for (const statement of built.statements) {
    const span = spanOf.get(statement.section)!;
    const toSeconds = new Map<Fraction, Fraction>();
    const secondsOf = (length: Fraction): Fraction => {
      let seconds = toSeconds.get(length);
      if (seconds === undefined) toSeconds.set(length, (seconds = length.mul(span.secondsOfWhole)));
      return seconds;
    };
    const base = span.seconds.add(secondsOf(statement.start.sub(span.start)));
    let at = ZERO;
    let attack = 0;
    statement.rhythm.forEach((value, index) => {
      if (!value.rest) {
        const instrument = statement.assigned?.[attack] ?? statement.instrument;
        attack += 1;
        if (instrument !== null) {
          events.push({
            instrument,
            seconds: base.add(at.mul(span.secondsOfWhole)),
            lasts: secondsOf(value.length),
            position: statement.start.add(at),
            ...(value.accent === undefined ? {} : { accent: value.accent }),
            ...(value.roll === undefined ? {} : { roll: value.roll }),
            ...(value.sound === undefined ? {} : { sound: value.sound }),
            ...(value.ends === undefined ? {} : { ends: value.ends }),
            statement: statement.id,
            value: index,
            origin: statement.origins[index] ?? null,
          });
        }
      }
      at = at.add(value.length);
    });
  }
  return events.sort((a, b) => a.position.compare(b.position));
}
