import { EngineError } from '../errors';
import { printScore } from '../print/print-score';
import type { PrintScore, PrintStaff } from '../print/types';
import { buildStudy } from '../study/build';
import { type StudyInput, parseStudy } from '../study/schema';
import { element, textElement } from './write/xml';
import { scoreInstruments, scorePart } from './write/xml-instruments';
import { divisionsOf, partMeasures } from './write/xml-measures';

const partId = (index: number): string => `P${index + 1}`;

function nameOf(score: PrintScore, { instruments }: PrintStaff, index: number): string {
  if (score.part === null) return instruments.map(({ name }) => name).join(', ');
  return score.staves.length === 1 ? score.part.name : `${score.part.name}, ${index + 1}`;
}

/** The parts in the order of the score, those of one player in a bracket. */
function partList(score: PrintScore): string {
  const grouped = score.groups.filter(({ length }) => length > 1);
  const entries = score.staves.map((staff, index) => {
    const begins = grouped.findIndex(({ first }) => first === index);
    const ends = grouped.findIndex(({ first, length }) => first + length - 1 === index);
    return [
      begins === -1 ? '' : element('part-group', { type: 'start', number: begins + 1 }, textElement('group-name', grouped[begins]!.name), textElement('group-symbol', 'bracket'), textElement('group-barline', 'no')),
      scorePart(partId(index), nameOf(score, staff, index), scoreInstruments(partId(index), staff)),
      ends === -1 ? '' : element('part-group', { type: 'stop', number: ends + 1 }),
    ].join('\n');
  });
  return element('part-list', {}, entries.join('\n'));
}

/**
 * A study as MusicXML 4.0, part by part: its score, or a player's part with changes of instrument. Everything that is played is
 * written out, repeats too; unpitched notes stand where the drawn score has them. Divisions are the least that make every
 * duration whole, also above 16383, which some MIDI programs take no more of.
 * @param options.part - id of a player, or of an instrument that is to have a part of its own
 * @throws EngineError as `buildStudy`; `unknown_player`; `unspellable` where a line cannot be written
 * @see MusicXML 4.0, W3C Music Notation Community Group, 2021
 */
export function toMusicXML(document: StudyInput, { part }: { part?: string } = {}): string {
  const study = parseStudy(document);
  const score = printScore(study, buildStudy(study), part === undefined ? {} : { part });
  const [failure] = score.failures;
  if (failure !== undefined) throw new EngineError(failure.error.code, `${failure.instrument.name}: ${failure.error.message}`);
  if (score.staves.length === 0) throw new EngineError('cannot_write', part === undefined ? 'There is no instrument in this study to write a part for.' : `${score.part!.name} has no instrument to write a part for.`);
  const divisions = divisionsOf(score);
  const parts = score.staves.map((staff, index) => `<part id="${partId(index)}">\n${partMeasures(score, staff, scoreInstruments(partId(index), staff), divisions, index === 0)}\n</part>`);
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    '<score-partwise version="4.0">',
    element('work', {}, textElement('work-title', score.title)),
    element(
      'identification',
      {},
      score.composer === null ? '' : textElement('creator', score.composer, { type: 'composer' }),
      score.rights === null ? '' : textElement('rights', score.rights),
      element('encoding', {}, textElement('software', 'Sesqui')),
    ),
    partList(score),
    ...parts,
    '</score-partwise>',
    '',
  ].join('\n');
}
