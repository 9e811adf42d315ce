import { writeMidi, type MidiEvent } from 'midi-file';
import { zipSync } from 'fflate';
import { crc32 } from 'node:zlib';

/** MusicXML of one part: what stands in its measures, and what comes before them. */
export function musicXML(measures: readonly string[], { parts = '', head = '<?xml version="1.0"?>', name = 'Claves', listed = '' } = {}): string {
  const written = measures.map((text, index) => `<measure number="${index + 1}">${text}</measure>`).join('');
  return `${head}<score-partwise version="4.0"><part-list><score-part id="P1"><part-name>${name}</part-name>${listed}</score-part></part-list><part id="P1">${written}</part>${parts}</score-partwise>`;
}

export const attributes = (divisions: number, time = '4/4'): string =>
  `<attributes><divisions>${divisions}</divisions><time><beats>${time.split('/')[0]}</beats><beat-type>${time.split('/')[1]}</beat-type></time></attributes>`;
export const note = (duration: number, inside = ''): string => `<note><unpitched/><duration>${duration}</duration>${inside}</note>`;
export const rest = (duration: number, inside = ''): string => `<note><rest/><duration>${duration}</duration>${inside}</note>`;
export const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);

const CONTAINER = '<?xml version="1.0"?><container><rootfiles><rootfile full-path="score.xml"/></rootfiles></container>';

/** A compressed MusicXML file, as anybody writes it. */
export const mxl = (score: string, more: Record<string, Uint8Array> = {}, container = CONTAINER): Uint8Array =>
  zipSync({ 'META-INF/container.xml': bytesOf(container), 'score.xml': bytesOf(score), ...more });

export type RawEntry = { readonly name: string; readonly data: Uint8Array; readonly method?: number; readonly flags?: number; readonly packed?: number; readonly unpacked?: number; readonly crc?: number };

/** A zip file byte by byte, which may lie about its sizes. */
export function rawZip(entries: readonly RawEntry[], { count = entries.length } = {}): Uint8Array {
  const [locals, list]: [Buffer[], Buffer[]] = [[], []];
  let offset = 0;
  for (const { name, data, method = 0, flags = 0, packed = data.length, unpacked = data.length, crc = crc32(data) } of entries) {
    const common = Buffer.alloc(26);
    common.writeUInt16LE(20, 0);
    common.writeUInt16LE(flags, 2);
    common.writeUInt16LE(method, 4);
    common.writeUInt32LE(crc >>> 0, 10);
    common.writeUInt32LE(packed >>> 0, 14);
    common.writeUInt32LE(unpacked >>> 0, 18);
    common.writeUInt16LE(name.length, 22);
    const local = Buffer.concat([Buffer.from('PK\u0003\u0004', 'latin1'), common, Buffer.from(name, 'latin1'), data]);
    const place = Buffer.alloc(14);
    place.writeUInt32LE(offset, 10);
    list.push(Buffer.concat([Buffer.from('PK\u0001\u0002\u0014\u0000', 'latin1'), common, place, Buffer.from(name, 'latin1')]));
    locals.push(local);
    offset += local.length;
  }
  const listed = Buffer.concat(list);
  const end = Buffer.alloc(22);
  end.write('PK\u0005\u0006', 'latin1');
  end.writeUInt16LE(count, 8);
  end.writeUInt16LE(count, 10);
  end.writeUInt32LE(listed.length, 12);
  end.writeUInt32LE(offset, 16);
  return new Uint8Array(Buffer.concat([...locals, listed, end]));
}

export const container = (path = 'score.xml'): RawEntry => ({ name: 'META-INF/container.xml', data: bytesOf(CONTAINER.replace('score.xml', path)) });

type Hit = readonly [at: number, length: number, key?: number, channel?: number];

/** A MIDI track of notes, by a writer that is not ours; times in ticks. */
export function midiTrack(hits: readonly Hit[], { name = 'Drums', end = 0, first = [] as MidiEvent[] } = {}): MidiEvent[] {
  const events = hits.flatMap(([at, length, noteNumber = 60, channel = 9]) => [
    { at, order: 1, event: { type: 'noteOn', channel, noteNumber, velocity: 80 } },
    { at: at + length, order: 0, event: { type: 'noteOff', channel, noteNumber, velocity: 0 } },
  ]);
  events.sort((a, b) => a.at - b.at || a.order - b.order);
  let at = 0;
  const timed = events.map(({ at: next, event }) => {
    const deltaTime = next - at;
    at = next;
    return { deltaTime, ...event } as MidiEvent;
  });
  return [{ deltaTime: 0, type: 'trackName', text: name, meta: true } as MidiEvent, ...first, ...timed, { deltaTime: Math.max(0, end - at), type: 'endOfTrack', meta: true } as MidiEvent];
}

export const midi = (tracks: readonly MidiEvent[][], { format = 1 as 0 | 1 | 2, ticksPerBeat = 480 } = {}): Uint8Array =>
  new Uint8Array(writeMidi({ header: { format, numTracks: tracks.length, ticksPerBeat }, tracks: [...tracks] }));

export const metreEvent = (numerator: number, denominator: number, deltaTime = 0): MidiEvent => ({ deltaTime, type: 'timeSignature', numerator, denominator, metronome: 24, thirtyseconds: 8, meta: true }) as MidiEvent;
export const tempoEvent = (microsecondsPerBeat: number, deltaTime = 0): MidiEvent => ({ deltaTime, type: 'setTempo', microsecondsPerBeat, meta: true }) as MidiEvent;
