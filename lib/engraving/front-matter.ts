import { type Instrument, type PrintNote, type PrintScore, formatClock } from '@/engine';
import type { VexFlow } from './notes';
import type { PageGeometry } from './page-options';
import { BODY_TEXT, COMPOSER_TEXT, HEADING_TEXT, TITLE_TEXT } from './page-text';
import { lineReach, staffShape, stepsOf } from './shape';
import { type TextStyle, addText, textWidth } from './text';

/** A piece of front matter: how tall it is, and how it is drawn at a height. */
export type FrontBlock = { readonly height: number; readonly draw: (group: Element, context: import('vexflow/bravura').RenderContext, y: number) => void };

/** Breaks words into lines of a width; a word wider than the line is cut. */
export function wrap(vf: VexFlow, text: string, style: TextStyle, width: number): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/\s+/).flatMap((one) => pieces(vf, one, style, width))) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (line !== '' && textWidth(vf, longer, style) > width) {
      lines.push(line);
      line = word;
    } else line = longer;
  }
  if (line !== '') lines.push(line);
  return lines;
}

function pieces(vf: VexFlow, word: string, style: TextStyle, width: number): string[] {
  if (textWidth(vf, word, style) <= width) return [word];
  const found: string[] = [];
  let piece = '';
  for (const character of word) {
    if (piece !== '' && textWidth(vf, piece + character, style) > width) {
      found.push(piece);
      piece = '';
    }
    piece += character;
  }
  return [...found, piece];
}

function lines(vf: VexFlow, text: string, style: TextStyle, { left, right }: PageGeometry, { at = 0, after = 0 }: { at?: number; after?: number } = {}): FrontBlock[] {
  const leading = style.size * 1.32;
  const all = wrap(vf, text, style, right - left - at);
  return all.map((line, index): FrontBlock => ({
    height: leading + (index === all.length - 1 ? after : 0),
    draw: (group, _, y) => {
      const x = style.anchor === 'middle' ? (left + right) / 2 : style.anchor === 'end' ? right : left + at;
      addText(group, x, y + style.size, line, style);
    },
  }));
}

const space = (height: number): FrontBlock => ({ height, draw: () => undefined });

/** Where each sound of an instrument stands, 1 the lowest. */
function keyBlock(vf: VexFlow, { name, sounds = 1 }: Pick<Instrument, 'name' | 'sounds'>, { left }: PageGeometry): FrontBlock {
  const shape = staffShape(sounds);
  const above = Math.max(lineReach(shape).above, 20) + 24;
  const below = Math.max(lineReach(shape).below, 14, 8 - 5 * stepsOf(shape.keys[0]!)) + 16;
  return {
    height: above + below,
    draw: (group, context, y) => {
      const middle = y + above;
      const width = 60 + sounds * 34;
      addText(group, left, middle + 5, name, BODY_TEXT);
      const stave = new vf.Stave(left + 170, middle - 60, width);
      stave.setConfigForLines(shape.lines.toReversed().map((visible) => ({ visible })));
      stave.addClef('percussion').setContext(context).draw();
      const notes = shape.keys.slice(0, sounds).map((key) => new vf.StaveNote({ keys: [key], duration: '4', stemDirection: vf.Stem.UP }));
      const voice = new vf.Voice({ numBeats: 4, beatValue: 4 }).setMode(vf.VoiceMode.SOFT).addTickables(notes);
      new vf.Formatter().joinVoices([voice]).format([voice], sounds * 34);
      voice.draw(context, stave);
      if (sounds > 1) notes.forEach((note, index) => addText(group, note.getAbsoluteX() + 6, middle + below - 4, String(index + 1), { size: 11.5, anchor: 'middle' }));
    },
  };
}

type Sign = { readonly words: string; readonly isUsed: (note: PrintNote) => boolean };
const SIGNS: readonly Sign[] = [
  { words: 'Three slashes through the stem: a roll for the whole length of the note.', isUsed: ({ roll }) => roll === true },
  { words: 'A short curve that leads to nothing: let it ring.', isUsed: ({ ends }) => ends === 'let-ring' },
  { words: 'A circle with a cross over a note: stop the sound at the end of its length.', isUsed: ({ ends }) => ends === 'choke' },
  { words: 'An open wedge is an accent, an upright one a strong accent.', isUsed: ({ accent }) => accent !== undefined },
];

function usedSigns({ measures, staves, repeats }: PrintScore): string[] {
  const open = new Set(SIGNS);
  for (const staff of staves) {
    for (const { index } of measures) {
      if (open.size === 0) break;
      if (staff.isSilent(index)) continue;
      for (const note of staff.cell(index).notes) for (const sign of open) if (!note.symbol.rest && sign.isUsed(note)) open.delete(sign);
    }
  }
  const signs = SIGNS.filter((sign) => !open.has(sign)).map(({ words }) => words);
  if (repeats.length > 0) signs.push('Measures between repeat signs are played as often as is written over them, in all.');
  if (measures.some(({ tempo }) => tempo?.equivalence)) signs.push('Two values with = between them: the first, before the sign, lasts as long as the second, after it.');
  return signs;
}

const CAUTION =
  'Percussion at close range can exceed safe levels: measure, wear protection, keep your distance, take breaks. Local rules and hearing-care professionals decide.';

const plural = (count: number, word: string): string => `${count} ${word}${count === 1 ? '' : 's'}`;

/** The head of a part: title, player, instruments, and where their sounds stand. */
export function partHead(vf: VexFlow, score: PrintScore, geometry: PageGeometry): FrontBlock[] {
  const instruments = score.staves.flatMap((staff) => staff.instruments);
  return [
    ...lines(vf, score.title, { ...TITLE_TEXT, size: 32, anchor: 'middle' }, geometry),
    ...(score.composer === null ? [] : lines(vf, score.composer, { ...COMPOSER_TEXT, anchor: 'end' }, geometry)),
    ...lines(vf, score.part!.name, { size: 19, weight: 'bold' }, geometry),
    ...lines(vf, instruments.map(({ name }) => name).join(', '), BODY_TEXT, geometry, { after: 6 }),
    ...instruments.filter(({ sounds = 1 }) => sounds > 1).map((instrument) => keyBlock(vf, instrument, geometry)),
    space(10),
  ];
}

/** What stands before a score: title, who plays what, how it is written, and the caution about hearing. */
export function frontBlocks(vf: VexFlow, score: PrintScore, geometry: PageGeometry): FrontBlock[] {
  const instruments = score.staves.flatMap((staff) => staff.instruments);
  const nameOf = (id: string): string => instruments.find((one) => one.id === id)?.name ?? '';
  const shared = (id: string, player: string): string => {
    const others = score.players.filter((one) => one.id !== player && one.instruments.includes(id)).map(({ name }) => name);
    return others.length === 0 ? nameOf(id) : `${nameOf(id)} (shared with ${others.join(', ')})`;
  };
  const plain = instruments.filter(({ sounds = 1 }) => sounds === 1);
  const several = instruments.filter(({ sounds = 1 }) => sounds > 1);
  const alone = instruments.filter(({ id }) => !score.players.some((player) => player.instruments.includes(id)));
  const players = score.players.filter((player) => player.instruments.length > 0);
  const last = score.measures.at(-1)?.number ?? 0;
  const facts = [`about ${formatClock(score.duration)}`, plural(last, 'measure'), ...(players.length > 0 ? [plural(players.length, 'player')] : []), plural(instruments.length, 'instrument')].join(', ');
  const heading = (text: string): FrontBlock[] => [space(22), ...lines(vf, text, HEADING_TEXT, geometry, { after: 4 })];
  const signs = usedSigns(score);
  return [
    space(60),
    ...lines(vf, score.title, { ...TITLE_TEXT, anchor: 'middle' }, geometry, { after: 10 }),
    ...(score.composer === null ? [] : lines(vf, score.composer, { ...COMPOSER_TEXT, anchor: 'middle' }, geometry)),
    ...lines(vf, facts, { ...BODY_TEXT, anchor: 'middle' }, geometry, { after: 20 }),
    ...heading('Players and instruments'),
    ...players.flatMap(({ id, name, instruments: own }) => lines(vf, `${name}: ${own.map((one) => shared(one, id)).join(', ')}`, BODY_TEXT, geometry, { after: 3 })),
    ...(alone.length === 0 ? [] : lines(vf, `${players.length > 0 ? 'Not given to a player: ' : ''}${alone.map(({ name }) => name).join(', ')}`, BODY_TEXT, geometry)),
    ...heading('Where the sounds stand'),
    ...(plain.length === 0 ? [] : [...lines(vf, `On one line: ${plain.map(({ name }) => name).join(', ')}.`, BODY_TEXT, geometry, { after: 4 })]),
    ...(several.length === 0 ? [] : lines(vf, 'On several, numbered from the lowest sound:', BODY_TEXT, geometry)),
    ...several.map((instrument) => keyBlock(vf, instrument, geometry)),
    ...(signs.length === 0 ? [] : heading('Signs')),
    ...signs.flatMap((sign) => lines(vf, sign, BODY_TEXT, geometry, { after: 3 })),
    ...(score.failures.length === 0 ? [] : heading('Not in this score')),
    ...score.failures.flatMap(({ instrument, error }) => lines(vf, `${instrument.name}: ${error.message}`, BODY_TEXT, geometry, { after: 3 })),
    ...heading('Hearing'),
    ...lines(vf, CAUTION, BODY_TEXT, geometry),
  ];
}
