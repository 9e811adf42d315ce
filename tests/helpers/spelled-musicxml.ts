import { Fraction, type NotationMeasure, type NotationSymbol, parseMetre, symbolLength } from '@/engine';

const TYPES: Readonly<Record<NotationSymbol['base'], string>> = {
  '2': 'breve', '1': 'whole', '1/2': 'half', '1/4': 'quarter', '1/8': 'eighth', '1/16': '16th', '1/32': '32nd', '1/64': '64th', '1/128': '128th', '1/256': '256th',
};

/** Least common multiple of what quarters are divided into. */
function divisionsOf(measures: readonly NotationMeasure[]): bigint {
  const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? a : gcd(b, a % b));
  return measures.flatMap(({ symbols }) => symbols).reduce((common, symbol) => {
    const { d } = symbolLength(symbol).mul(4);
    return (common / gcd(common, d)) * d;
  }, 1n);
}

function time(metre: string): string {
  const { text, count, unit } = parseMetre(metre);
  return `<time><beats>${text.includes('+') ? text.split('/')[0] : count}</beats><beat-type>${unit}</beat-type></time>`;
}

function note(symbol: NotationSymbol, id: string, divisions: bigint, withBeams: boolean): string {
  const { base, dots, rest, tuplets, tiedFromBefore, tiedOn, beams } = symbol;
  const duration = symbolLength(symbol).mul(4).mul(new Fraction(divisions));
  if (duration.d !== 1n) throw new RangeError('divisions do not hold this symbol');
  const ratio = tuplets.reduce(({ actual, normal }, mark) => ({ actual: actual * mark.actual, normal: normal * mark.normal }), { actual: 1, normal: 1 });
  const marks = tuplets.flatMap((mark, level) => [
    ...(mark.starts ? [`<tuplet type="start" number="${level + 1}"/>`] : []),
    ...(mark.stops ? [`<tuplet type="stop" number="${level + 1}"/>`] : []),
  ]);
  const tied = `${tiedFromBefore ? '<tied type="stop"/>' : ''}${tiedOn ? '<tied type="start"/>' : ''}`;
  return [
    `<note id="${id}">`,
    rest ? '<rest/>' : '<unpitched><display-step>E</display-step><display-octave>4</display-octave></unpitched>',
    `<duration>${duration.n}</duration>`,
    `${tiedFromBefore ? '<tie type="stop"/>' : ''}${tiedOn ? '<tie type="start"/>' : ''}`,
    '<voice>1</voice>',
    `<type>${TYPES[base]}</type>`,
    '<dot/>'.repeat(dots),
    tuplets.length > 0 ? `<time-modification><actual-notes>${ratio.actual}</actual-notes><normal-notes>${ratio.normal}</normal-notes></time-modification>` : '',
    ...(withBeams ? beams : []).map((word, level) => `<beam number="${level + 1}">${word}</beam>`),
    marks.length > 0 || tied !== '' ? `<notations>${tied}${marks.join('')}</notations>` : '',
    '</note>',
  ].join('');
}

/**
 * Spelled measures as a MusicXML 4.0 part, for a reader that is not ours; what it says comes from the symbols alone. Symbols are
 * called `n0`, `n1` and so on, so that no name tells what is struck and what is tied.
 */
export function spelledMusicXML(measures: readonly NotationMeasure[], { withBeams = true } = {}): string {
  const divisions = divisionsOf(measures);
  let count = 0;
  const bars = measures.map(({ metre, symbols }, index) => {
    const attributes = index === 0 || measures[index - 1]!.metre !== metre ? `<attributes>${index === 0 ? `<divisions>${divisions}</divisions>` : ''}${time(metre)}${index === 0 ? '<clef><sign>percussion</sign></clef>' : ''}</attributes>` : '';
    const notes = symbols.map((symbol) => note(symbol, `n${count++}`, divisions, withBeams));
    return `<measure number="${index + 1}">${attributes}${notes.join('')}</measure>`;
  });
  return `<?xml version="1.0" encoding="UTF-8"?><score-partwise version="4.0"><part-list><score-part id="P1"><part-name>Line</part-name></score-part></part-list><part id="P1">${bars.join('')}</part></score-partwise>`;
}
