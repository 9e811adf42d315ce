import { describe, expect, it } from 'vitest';
import { formatRhythm } from '@/engine';
import { MusicFileError, readMusicFile } from '@/lib/client/music-file';
import { attributes, bytesOf, midi, midiTrack, musicXML, mxl, note, rest } from '../helpers/music-files';

const score = musicXML([attributes(12) + note(24) + note(24)], { parts: `<part id="P2"><measure>${attributes(12)}${rest(48)}</measure></part>` });
const read = async (bytes: Uint8Array, name = 'answer.x') => (await readMusicFile(name, bytes)).map(({ name: of, rhythm }) => [of, formatRhythm(rhythm)]);

describe('files of music, by their first bytes', () => {
  it.each<[string, Uint8Array, string[][]]>([
    ['MusicXML; lines without an attack are left out', bytesOf(score), [['Claves', '1/2 1/2']]],
    ['MusicXML in UTF-16', new Uint8Array(Buffer.from(`\ufeff${score}`, 'utf16le')), [['Claves', '1/2 1/2']]],
    ['compressed', mxl(score), [['Claves', '1/2 1/2']]],
    ['MIDI', midi([midiTrack([[0, 480]])]), [['Drums', '1/4']]],
    ['rhythm text as people type it', bytesOf('¼, ⅛ (⅛)\n'), [['answer.x', '1/4 1/8 (1/8)']]],
    ['rhythm text with a mark of its encoding', bytesOf('\ufeff1/4 1/8'), [['answer.x', '1/4 1/8']]],
  ])('%s', async (_, bytes, expected) => expect(await read(bytes)).toEqual(expected));

  it('rhythm text is one measure, so that all of it is taken', async () => {
    const [{ measures }] = (await readMusicFile('a', bytesOf('1/4 1/8'))) as [Awaited<ReturnType<typeof readMusicFile>>[0]];
    expect(measures.map(({ start, length }) => [start.toFraction(), length.toFraction()])).toEqual([['0', '3/8']]);
  });

  it.each<[string, Uint8Array, string]>([
    ['an entity', bytesOf('<!DOCTYPE a [<!ENTITY x SYSTEM "file:///etc/passwd">]><score-partwise>&x;</score-partwise>'), 'This file defines entities of its own'],
    ['damaged', bytesOf('<score-partwise><part>'), 'This MusicXML is cut off'],
    ['another XML', bytesOf('<svg/>'), 'its root is “svg”'],
    ['no attack', bytesOf(musicXML([attributes(12) + rest(48)])), 'holds no attack'],
    ['empty', bytesOf('  '), 'This file is empty.'],
    ['nothing', new Uint8Array(), 'This file is empty.'],
    ['compressed, and damaged', bytesOf('PK\u0003\u0004'), 'This compressed file is damaged or cut off'],
    ['too large', new Uint8Array(32 * 1024 * 1024 + 1), 'too large: 32 MB is the limit'],
    ['words', bytesOf('quarter eighth'), 'This file holds no rhythm that can be read.'],
    ['a picture', new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0xff]), 'This is no file of music that can be read.'],
  ])('%s is refused in a sentence', async (_, bytes, message) => {
    await expect(readMusicFile('x', bytes)).rejects.toThrow(MusicFileError);
    await expect(readMusicFile('x', bytes)).rejects.toThrow(message);
  });

  it('can be given up', async () => {
    const given = new AbortController();
    given.abort(new Error('given up'));
    await expect(readMusicFile('x', bytesOf(score), given.signal)).rejects.toThrow('given up');
  });
});
