import { LIMITS } from '../limits';
import { decoded } from './decode-text';
import { shown, unreadable } from './refuse';
import { type XmlReader, readXml } from './read-xml';
import type { ReadOptions } from './types';
import { unpack, zipEntries } from './unzip';

const CONTAINER = 'META-INF/container.xml';

/** Finds the score in the table of contents: the first root file. */
class ContainerReader implements XmlReader {
  path: string | null = null;

  where(): string {
    return CONTAINER;
  }

  open(name: string, attributes: Readonly<Record<string, string>>, depth: number): 'enter' | 'pass' {
    if (depth === 0 && name !== 'container') unreadable('This compressed file is no compressed MusicXML: its table of contents is of another kind.');
    if (depth === 2 && name === 'rootfile') this.path ??= attributes['full-path'] ?? null;
    return depth < 2 ? 'enter' : 'pass';
  }

  gathered(): void {}
  close(): void {}
}

/**
 * The score of a compressed MusicXML file, unpacked as it is asked for. Only the table of contents and the score that it names
 * are unpacked; nothing is looked for elsewhere.
 * @throws EngineError `unreadable_music`, `hostile_file`, `too_large`, `out_of_time`
 * @see W3C, MusicXML 4.0, Compressed .mxl files
 */
export async function openMxl(bytes: Uint8Array, options: ReadOptions): Promise<AsyncIterable<Uint8Array>> {
  const entries = zipEntries(bytes);
  const container = entries.get(CONTAINER) ?? unreadable('This compressed file is no compressed MusicXML: it has no META-INF/container.xml. Unpack it, and choose the score in it.');
  const reader = new ContainerReader();
  await readXml(decoded(unpack(bytes, container, LIMITS.containerBytes, options)), reader);
  const path = reader.path ?? unreadable('This compressed MusicXML does not say which of its files is the score.');
  const score = entries.get(path) ?? unreadable(`This compressed MusicXML names “${shown(path)}” as its score, and holds no such file.`);
  return unpack(bytes, score, Math.min(options.unpackedBytes ?? Infinity, LIMITS.unpackedBytes), options);
}
