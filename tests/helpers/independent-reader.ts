import createVerovioModule from 'verovio/wasm';
import { VerovioToolkit } from 'verovio/esm';

/** Where a note begins and ends, in whole notes, floating point. */
export type ReadNote = { readonly on: number; readonly off: number };

/** Verovio (npm, LGPL, verovio.org): an engraver that reads MusicXML and works out times from what is written. */
export async function openReader(): Promise<VerovioToolkit> {
  const reader = new VerovioToolkit(await createVerovioModule());
  reader.setOptions({ inputFrom: 'musicxml', breaks: 'none' });
  return reader;
}

function load(reader: VerovioToolkit, musicXML: string): void {
  if (reader.loadData(musicXML) === 0) throw new Error(`the reader refuses the file: ${reader.getLog()}`);
}

/** Begins and ends of every written note by its id, ties not yet joined: this reader's times leave tied notes apart. */
function readSymbols(reader: VerovioToolkit, musicXML: string): Map<string, ReadNote> {
  load(reader, musicXML);
  const begins = new Map<string, number>();
  const notes = new Map<string, ReadNote>();
  for (const { qstamp, on = [], off = [] } of reader.renderToTimemap({ includeMeasures: false, includeRests: false })) {
    for (const id of on) begins.set(id, qstamp / 4);
    for (const id of off) notes.set(id, { on: begins.get(id) ?? NaN, off: qstamp / 4 });
  }
  return notes;
}

type StruckNote = ReadNote & { readonly id: string };

/** What is struck, in order: the ties are those the reader has in its own MEI, whatever the file calls its notes. */
function struckNotes(reader: VerovioToolkit, musicXML: string): StruckNote[] {
  const notes = readSymbols(reader, musicXML);
  const next = new Map<string, string>();
  for (const [tie] of reader.getMEI().matchAll(/<tie [^>]*>/g)) {
    const [, from] = /startid="#([^"]+)"/.exec(tie) ?? [];
    const [, to] = /endid="#([^"]+)"/.exec(tie) ?? [];
    if (from === undefined || to === undefined) throw new Error(`the reader has a tie with one end: ${tie}`);
    const gap = Math.abs((notes.get(from)?.off ?? NaN) - (notes.get(to)?.on ?? NaN));
    if (!(gap < 1e-6)) throw new Error(`the reader has a tie between notes that do not touch: ${from}, ${to}`);
    next.set(from, to);
  }
  const continued = new Set(next.values());
  const struck: StruckNote[] = [];
  for (const [id, { on }] of notes) {
    if (continued.has(id)) continue;
    let last = id;
    for (let to = next.get(last); to !== undefined; to = next.get(last)) last = to;
    struck.push({ id, on, off: notes.get(last)?.off ?? NaN });
  }
  return struck.sort((a, b) => a.on - b.on);
}

/** What is struck, in order. */
export const readStruck = (reader: VerovioToolkit, musicXML: string): ReadNote[] => struckNotes(reader, musicXML).map(({ on, off }) => ({ on, off }));

/** What is struck on each staff, by the number of the staff from 1, in order. */
export function readStaves(reader: VerovioToolkit, musicXML: string): Map<number, ReadNote[]> {
  const struck = struckNotes(reader, musicXML);
  const staffOf = new Map<string, number>();
  let staff = 0;
  for (const [tag] of reader.getMEI().matchAll(/<(?:staff|note)\b[^>]*>/g)) {
    if (tag.startsWith('<staff')) staff = Number(/\bn="(\d+)"/.exec(tag)?.[1]);
    else staffOf.set(/xml:id="([^"]+)"/.exec(tag)?.[1] ?? '', staff);
  }
  const staves = new Map<number, ReadNote[]>();
  for (const { id, on, off } of struck) staves.set(staffOf.get(id) ?? 0, [...(staves.get(staffOf.get(id) ?? 0) ?? []), { on, off }]);
  return staves;
}

/** The brackets that the reader's own MEI has round a note, from outside in. */
export function bracketsRound(reader: VerovioToolkit, musicXML: string, id: string): string[] {
  load(reader, musicXML);
  const open: string[] = [];
  for (const [tag] of reader.getMEI().matchAll(/<\/?(?:tuplet|note|rest)\b[^>]*>/g)) {
    if (tag.includes(`xml:id="${id}"`)) return open;
    if (tag === '</tuplet>') open.pop();
    const [, actual, normal] = /^<tuplet .*num="(\d+)" numbase="(\d+)"/.exec(tag) ?? [];
    if (actual !== undefined && normal !== undefined) open.push(`${actual}:${normal}`);
  }
  throw new Error(`the reader has no note ${id}`);
}
