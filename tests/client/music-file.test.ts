import fs from 'node:fs';
import path from 'node:path';
import { JSDOM } from 'jsdom';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { formatRhythm, parseRhythm, spellLine } from '@/engine';
import { MusicFileError, readMusicFile } from '@/lib/client/music-file';
import { spelledMusicXML } from '../helpers/spelled-musicxml';

// The browser's reader of XML alone: a whole jsdom environment would be built for the browser, where node:fs is not to be had.
beforeAll(() => void vi.stubGlobal('DOMParser', new JSDOM().window.DOMParser));
afterAll(() => void vi.unstubAllGlobals());

const note = (duration: number, inside = '', rest = false) => `<note>${rest ? '<rest/>' : '<unpitched/>'}<duration>${duration}</duration>${inside}</note>`;
const file = (measures: string, more = '') =>
  `<?xml version="1.0"?><!DOCTYPE score-partwise PUBLIC "-//Recordare//DTD MusicXML 4.0 Partwise//EN" "http://www.musicxml.org/dtds/partwise.dtd"><score-partwise><part-list><score-part id="P1"><part-name>Claves</part-name></score-part></part-list><part id="P1"><measure number="1"><attributes><divisions>12</divisions></attributes>${measures}</measure></part>${more}</score-partwise>`;
const read = (text: string) => readMusicFile('answer.musicxml', text).map(({ name, rhythm }) => [name, formatRhythm(rhythm)]);

describe('MusicXML', () => {
  it('what is written is read back exactly, ties joined: our own spelling by a reader of files', () => {
    for (const text of ['3/8 1/8 1/4 (1/4) 1/8 1/8 1/4 1/2', '1/12 1/12 1/12 1/20 1/20 1/20 1/20 1/20 1/2', '7/8 7/8 1/4', '1/60 1/60 1/60 1/60 1/60 1/6 3/4']) {
      expect(read(spelledMusicXML(spellLine(parseRhythm(text), '4/4')))).toEqual([['Line', text]]);
    }
  });
  it('voices apart, silent where they are not written; chords once, grace notes, pitches and repeats told', () => {
    const [first, second] = readMusicFile('x.xml', file(`${note(12, '<voice>1</voice>')}<note><chord/><unpitched/><duration>12</duration><voice>1</voice></note><note><grace/><pitch/></note>${note(36, '<voice>1</voice>')}<backup><duration>24</duration></backup>${note(24, '<voice>2</voice>')}<barline><repeat direction="backward"/></barline>`));
    expect([first!.name, formatRhythm(first!.rhythm)]).toEqual(['Claves, voice 1', '1/4 3/4']);
    expect([second!.name, formatRhythm(second!.rhythm)]).toEqual(['Claves, voice 2', '(1/2) 1/2']);
    expect(first!.warnings).toEqual(['Grace notes were left out.', 'Repeats are read once.']);
  });

  it.each([
    ['an entity', '<!DOCTYPE a [<!ENTITY x SYSTEM "file:///etc/passwd">]><score-partwise>&x;</score-partwise>', 'This file defines entities of its own'],
    ['damaged', '<score-partwise><part>', 'no well-formed MusicXML'],
    ['another XML', '<svg/>', 'its root is “svg”'],
    ['measure by measure', '<score-timewise/>', 'score-partwise'],
    ['no attack', file(note(48, '', true)), 'holds no attack'],
    ['a duration of words', file('<note><unpitched/><duration>long</duration></note>'), 'Measure 1: a duration is missing or no whole number.'],
    ['divisions of 0', file('<attributes><divisions>0</divisions></attributes>'), 'the number of divisions is 0'],
    ['going back too far', file('<backup><duration>12</duration></backup>'), 'goes back beyond its beginning'],
    ['empty', '  ', 'This file is empty.'],
    ['compressed', 'PK\u0003\u0004', 'This is a compressed file.'],
    ['too large', 'x'.repeat(2 * 1024 * 1024 + 1), 'too large'],
    ['words', 'quarter eighth', 'This file holds no rhythm that can be read.'],
  ])('%s is refused in a sentence', (_, text, message) => {
    expect(() => readMusicFile('x', text)).toThrow(MusicFileError);
    expect(() => readMusicFile('x', text)).toThrow(message);
  });
});

describe('rhythm text', () => {
  it('as people type it', () => expect(readMusicFile('a.txt', '¼, ⅛ (⅛)\n').map(({ name, rhythm }) => [name, formatRhythm(rhythm)])).toEqual([['a.txt', '1/4 1/8 (1/8)']]));
});

/** The MusicXML test suite of the LilyPond project, where it lies beside the clone; skipped where it does not. */
const SUITE = path.resolve('../shared/reference/musicxml-suite');
describe.skipIf(!fs.existsSync(SUITE))('the files of the MusicXML test suite (skipped where it is not at hand)', () => {
  const files = fs.existsSync(SUITE) ? fs.readdirSync(SUITE, { recursive: true, encoding: 'utf8' }).filter((name) => /\.(xml|musicxml)$/.test(name)) : [];
  it('are read, or refused in a sentence', () => {
    let read = 0;
    for (const name of files) {
      try {
        for (const { rhythm } of readMusicFile(name, fs.readFileSync(path.join(SUITE, name), 'utf8'))) expect(rhythm.length).toBeGreaterThan(0);
        read += 1;
      } catch (error) {
        expect(error, name).toBeInstanceOf(MusicFileError);
        expect((error as Error).message, name).toMatch(/[.]$/);
      }
    }
    console.info(`MusicXML suite: ${read} of ${files.length} files read, the others refused in a sentence`);
    expect(read).toBeGreaterThan(files.length / 2);
  });
});
