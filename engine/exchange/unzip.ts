import { Inflate } from 'fflate';
import { LIMITS } from '../limits';
import { crc32 } from './crc32';
import { hostile, megabytes, shown, tooLarge, unreadable } from './refuse';
import { nextStep } from './steps';
import type { ReadOptions } from './types';

/** One entry of a compressed file, as its list of contents has it. */
export type ZipEntry = { readonly name: string; readonly method: number; readonly packed: number; readonly unpacked: number; readonly crc: number; readonly offset: number };

const END = 0x06054b50;
const LISTED = 0x02014b50;
const LOCAL = 0x04034b50;
const END_BYTES = 22;
const LISTED_BYTES = 46;
const LOCAL_BYTES = 30;
const STORED = 0;
const DEFLATED = 8;
/** Packed bytes given to the inflater at once: what comes out of them is looked at before more goes in. */
const PIECE = 4 * 1024;

const viewOf = (bytes: Uint8Array): DataView => new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
const isEscaping = (name: string): boolean => /^[/\\]|^[a-z]:|\\|(?:^|\/)\.\.(?:\/|$)|\0/i.test(name);

function findEnd(view: DataView): number {
  // The list's end may be followed by a comment of at most 65,535 bytes.
  const first = Math.max(0, view.byteLength - END_BYTES - 0xffff);
  for (let at = view.byteLength - END_BYTES; at >= first; at -= 1) if (view.getUint32(at, true) === END) return at;
  return unreadable('This compressed file is damaged or cut off: its list of contents, at the end, is missing.');
}

function readEntry(bytes: Uint8Array, view: DataView, at: number, index: number): { entry: ZipEntry; next: number } {
  if (at + LISTED_BYTES > bytes.length || view.getUint32(at, true) !== LISTED) {
    return unreadable(`This compressed file is damaged: entry ${index + 1} of its list of contents, at byte ${at}, cannot be read.`);
  }
  const [flags, method] = [view.getUint16(at + 8, true), view.getUint16(at + 10, true)];
  const [crc, packed, unpacked, offset] = [16, 20, 24, 42].map((field) => view.getUint32(at + field, true)) as [number, number, number, number];
  const nameEnd = at + LISTED_BYTES + view.getUint16(at + 28, true);
  const name = String.fromCharCode(...bytes.subarray(at + LISTED_BYTES, nameEnd));
  if (isEscaping(name)) hostile(`This compressed file holds “${shown(name)}”, which points out of the file. It is not opened.`);
  if ((flags & 1) === 1) unreadable(`“${shown(name)}” in this compressed file is locked by a password. Save it without one.`);
  if ([packed, unpacked, offset].includes(0xffffffff)) hostile('This compressed file is of a kind for more than 4 GB (zip64), which no music needs. Save it again as .mxl or .musicxml.');
  return { entry: { name, method, packed, unpacked, crc, offset }, next: nameEnd + view.getUint16(at + 30, true) + view.getUint16(at + 32, true) };
}

/**
 * The list of contents of a compressed file. Nothing is unpacked; sizes and numbers are looked at first.
 * @throws EngineError `unreadable_music`, `hostile_file`, `too_large`
 * @see PKWARE, APPNOTE 6.3.3, 4.3.12 and 4.3.16
 */
export function zipEntries(bytes: Uint8Array): Map<string, ZipEntry> {
  const view = viewOf(bytes);
  const end = findEnd(view);
  const count = view.getUint16(end + 10, true);
  let at = view.getUint32(end + 16, true);
  if (count === 0xffff || at === 0xffffffff) hostile('This compressed file is of a kind for more than 4 GB (zip64), which no music needs. Save it again as .mxl or .musicxml.');
  if (count > LIMITS.zipEntries) hostile(`This compressed file says that it holds ${count} files; ${LIMITS.zipEntries} are the limit. It is not opened.`);
  const entries = new Map<string, ZipEntry>();
  let total = 0;
  for (let index = 0; index < count; index += 1) {
    const { entry, next } = readEntry(bytes, view, at, index);
    if (entries.has(entry.name)) hostile(`This compressed file holds “${shown(entry.name)}” twice. It is not opened.`);
    entries.set(entry.name, entry);
    at = next;
    total += entry.unpacked;
  }
  if (total > LIMITS.unpackedBytes) hostile(`This compressed file would unpack to ${megabytes(total)}; ${megabytes(LIMITS.unpackedBytes)} are the limit. It is not opened.`);
  return entries;
}

function packedBytes(bytes: Uint8Array, { name, offset, packed }: ZipEntry): Uint8Array {
  const view = viewOf(bytes);
  if (offset + LOCAL_BYTES > bytes.length || view.getUint32(offset, true) !== LOCAL) unreadable(`This compressed file is damaged: “${shown(name)}” is not where it should be, at byte ${offset}.`);
  const from = offset + LOCAL_BYTES + view.getUint16(offset + 26, true) + view.getUint16(offset + 28, true);
  if (from + packed > bytes.length) unreadable(`This compressed file is cut off: “${shown(name)}” should go on to byte ${from + packed}, and the file ends at ${bytes.length}.`);
  return bytes.subarray(from, from + packed);
}

/** A deflated entry, piece by piece. */
function* inflated(data: Uint8Array, name: string): Generator<Uint8Array[]> {
  let out: Uint8Array[] = [];
  const inflate = new Inflate((piece) => out.push(piece));
  for (let at = 0; at < data.length || at === 0; at += PIECE) {
    out = [];
    try {
      inflate.push(data.subarray(at, at + PIECE), at + PIECE >= data.length);
    } catch {
      unreadable(`“${shown(name)}” in this compressed file is damaged and cannot be unpacked.`);
    }
    yield out;
  }
}

/**
 * Unpacks one entry in pieces, and stops as soon as more comes out than was declared: bombs lie.
 * @throws EngineError `unreadable_music`, `hostile_file`, `too_large`, `out_of_time`
 */
export async function* unpack(bytes: Uint8Array, entry: ZipEntry, most: number, options: ReadOptions): AsyncGenerator<Uint8Array> {
  const { name, method, unpacked, packed } = entry;
  if (method !== STORED && method !== DEFLATED) unreadable(`“${shown(name)}” is compressed in a way that is not read (method ${method}). Save it again as .mxl or .musicxml.`);
  if (unpacked > most) tooLarge(`“${shown(name)}” would unpack to ${megabytes(unpacked)}; ${most < 1024 * 1024 ? `${most / 1024} kB` : megabytes(most)} are the limit.`);
  if (unpacked > Math.max(1024 * 1024, packed * LIMITS.unpackRatio)) hostile(`“${shown(name)}” would become ${Math.floor(unpacked / Math.max(1, packed))} times as large when it is unpacked, which no music does. It is not opened.`);
  const data = packedBytes(bytes, entry);
  let [size, crc] = [0, 0];
  for (const pieces of method === STORED ? [[data]] : inflated(data, name)) {
    for (const piece of pieces) {
      size += piece.length;
      if (size > unpacked) hostile(`“${shown(name)}” in this compressed file is larger than the file says (${unpacked} bytes). It was not read further.`);
      crc = crc32(piece, crc);
      yield piece;
    }
    await nextStep(options);
  }
  if (size !== unpacked || crc !== entry.crc) unreadable(`“${shown(name)}” in this compressed file is damaged: it does not unpack to what was packed.`);
}
