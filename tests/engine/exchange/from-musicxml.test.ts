import { describe, expect, it } from 'vitest';
import { EngineError, formatFraction, formatRhythm, fromMusicXML } from '@/engine';
import { attributes, bytesOf, musicXML, mxl, note, rest } from '../../helpers/music-files';

const read = async (input: string | Uint8Array) => (await fromMusicXML(input)).map(({ name, rhythm }) => [name, formatRhythm(rhythm)]);
const one = async (...measures: string[]) => (await fromMusicXML(musicXML(measures)))[0]!;
const A = attributes(12);
const tie = (...types: string[]) => types.map((type) => `<tie type="${type}"/>`).join('');
const unpitched = (step: string, octave: number, inside = '') => `<note><unpitched><display-step>${step}</display-step><display-octave>${octave}</display-octave></unpitched><duration>12</duration>${inside}</note>`;

describe('lengths', () => {
  it.each<[string, string[], string]>([
    ['what durations say', [A + note(12) + note(18) + rest(6) + note(12)], '1/4 3/8 (1/8) 1/4'],
    ['1 a quarter where nothing is said', ['<attributes/>' + note(4)], '1'],
    ['divisions that change', [A + note(48), attributes(1) + note(2) + attributes(5) + note(2) + note(3) + note(5)], '1 1/2 1/10 3/20 1/4'],
    ['durations that are no whole numbers', [attributes(1) + '<note><unpitched/><duration>.5</duration></note>' + note(3) + '<note><unpitched/><duration>0.50</duration></note>'], '1/8 3/4 1/8'],
    ['type, dots and tuplet where there is no duration', [A + '<note><unpitched/><type>half</type><dot/><dot/></note>' + '<note><unpitched/><type>eighth</type><time-modification><actual-notes>3</actual-notes><normal-notes>2</normal-notes></time-modification></note>' + rest(2)], '7/8 1/12 (1/24)'],
    ['a rest of a measure', [attributes(12, '3/4') + '<note><rest measure="yes"/></note>', note(36)], '(3/4) 3/4'],
    ['ties over bar lines', [A + note(36) + note(12, tie('start')), note(48, tie('stop', 'start')), note(12, tie('stop')) + note(36)], '3/4 3/2 3/4'],
    ['ties that are only drawn', [A + note(36) + note(12, '<notations><tied type="start"/></notations>'), note(48, '<notations><tied type="stop"/></notations>')], '3/4 5/4'],
    ['rests side by side are one, over bar lines too', [A + note(12) + rest(12) + rest(24), rest(24) + note(24)], '1/4 (5/4) 1/2'],
    ['chords once', [A + note(12) + '<note><chord/><unpitched/><duration>12</duration></note>' + note(36)], '1/4 3/4'],
    ['grace notes and cues left out', [A + '<note><grace/><unpitched/></note>' + note(24) + '<note><cue/><unpitched/><duration>24</duration></note>'], '1/2 (1/2)'],
    ['forwards is silence', [A + '<forward><duration>24</duration></forward>' + note(24)], '(1/2) 1/2'],
    ['rests alone stay as they are written', [A + rest(24) + rest(24)], '(1/2) (1/2)'],
    ['notes of one voice at once are one attack', [A + note(48) + '<backup><duration>48</duration></backup>' + note(12) + note(36)], '1/4 3/4'],
  ])('%s', async (_, measures, expected) => {
    expect(formatRhythm((await one(...measures)).rhythm)).toBe(expected);
  });

  it('voices apart, silent where they are not written; parts apart, and named apart', async () => {
    const two = musicXML([A + note(24, '<voice>1</voice>') + note(24, '<voice>1</voice>') + '<backup><duration>24</duration></backup>' + note(12, '<voice>2</voice>')], { parts: `<part id="P2"><measure number="1">${A}${note(48)}</measure></part><part id="P3"><measure number="1">${A}${rest(48)}</measure></part>` });
    expect(await read(two)).toEqual([['Claves, voice 1', '1/2 1/2'], ['Claves, voice 2', '(1/2) 1/4 (1/4)'], ['Part 2', '1'], ['Part 3', '(1)']]);
    expect((await read(two.replace(/<part-list>.*<\/part-list>/, '<part-list>' + ['P2', 'P3'].map((id) => `<score-part id="${id}"><part-name>Bell</part-name></score-part>`).join('') + '</part-list>'))).map(([name]) => name)).toEqual(['Part 1, voice 1', 'Part 1, voice 2', 'Bell', 'Bell (2)']);
  });

  it('measure by measure as part by part', async () => {
    const timewise = `<score-timewise><part-list><score-part id="a"><part-name>A</part-name></score-part><score-part id="b"><part-name>B</part-name></score-part></part-list><measure number="1"><part id="a">${A}${note(48)}</part><part id="b">${attributes(1)}${note(1)}${note(3)}</part></measure><measure number="2"><part id="a">${note(24)}${rest(24)}</part><part id="b">${note(4)}</part></measure></score-timewise>`;
    expect(await read(timewise)).toEqual([['A', '1 1/2 (1/2)'], ['B', '1/4 3/4 1']]);
  });
});

describe('marks and sounds', () => {
  const marked = (inside: string) => note(12, `<notations>${inside}</notations>`);
  const tremolo = (type: string, strokes: number) => `<ornaments><tremolo type="${type}">${strokes}</tremolo></ornaments>`;
  it('accents and rolls', async () => {
    const { rhythm } = await one(A + marked('<articulations><accent/></articulations>') + marked('<articulations><strong-accent/></articulations>') + marked(tremolo('single', 3)) + marked(tremolo('unmeasured', 0)), marked(tremolo('single', 2)));
    expect(formatRhythm(rhythm)).toBe('1/4> 1/4^ 1/4/// 1/4/// 1/4');
  });
  it.each<[string, string[], string, string]>([
    ['places on the staff', [unpitched('E', 4), unpitched('C', 5), unpitched('F', 4), unpitched('E', 4)], '', '1/4@1 1/4@3 1/4@2 1/4@1'],
    ['one place is no number', [unpitched('E', 4), unpitched('E', 4)], '', '1/4 1/4'],
    ['instruments, by place first', [unpitched('E', 4, '<instrument id="x"/>'), unpitched('C', 4, '<instrument id="y"/>')], '', '1/4@2 1/4@1'],
    ['instruments on one line, by key', [unpitched('E', 4, '<instrument id="x"/>'), unpitched('E', 4, '<instrument id="y"/>')], '<score-instrument id="x"/><score-instrument id="y"/><midi-instrument id="x"><midi-unpitched>50</midi-unpitched></midi-instrument><midi-instrument id="y"><midi-unpitched>48</midi-unpitched></midi-instrument>', '1/4@2 1/4@1'],
    ['instruments on one line, as they are listed', [unpitched('E', 4, '<instrument id="x"/>'), unpitched('E', 4, '<instrument id="y"/>')], '<score-instrument id="y"/><score-instrument id="x"/>', '1/4@2 1/4@1'],
    ['one instrument of several sounds, numbered as it lists them, whichever are used', [unpitched('A', 4, '<instrument id="b"/>'), unpitched('E', 5, '<instrument id="d"/>')], ['a', 'b', 'c', 'd'].map((id) => `<score-instrument id="${id}"><instrument-name>Tom-toms</instrument-name></score-instrument>`).join(''), '1/4@2 1/4@4'],
    ['struck together, the lowest', [unpitched('E', 4), `${unpitched('C', 5)}${unpitched('C', 4, '').replace('<note>', '<note><chord/>')}`], '', '1/4@2 1/4@1'],
  ])('%s', async (_, notes, listed, expected) => {
    const [found] = await fromMusicXML(musicXML([A + notes.join('')], { listed }));
    expect(formatRhythm(found!.rhythm)).toBe(expected);
  });
  it('more than 12 are left out, and told', async () => {
    const places = Array.from({ length: 13 }, (_, n) => unpitched('CDEFGAB'[n % 7]!, 4 + Math.floor(n / 7)));
    const { rhythm, warnings } = await one(A + places.join(''));
    expect(rhythm.every(({ sound }) => sound === undefined)).toBe(true);
    expect(warnings.join(' ')).toContain('The sounds of the instrument were left out: it has 13, and 12 are the limit.');
  });
});

describe('what is odd is told, with its measure', () => {
  it.each<[string, string[], string]>([
    ['no divisions', [note(4)], 'The file does not say how a quarter note is divided: 1 was assumed, as is customary (measure 1).'],
    ['no metre', ['<attributes><divisions>1</divisions></attributes>' + note(4)], 'The file does not say a metre: 4/4 was assumed.'],
    ['no tempo', [A + note(48)], 'The file does not say a tempo: 120 quarter notes a minute were assumed.'],
    ['measures that are not full', [A + note(24), note(48), note(24)], 'A measure is not full: it lasts 1/2 of a whole note, where 4/4 lasts 1 (measures 1 and 3).'],
    ['an over-full measure', [A + note(48), note(60)], 'A measure is over-full: it lasts 5/4 of a whole note, where 4/4 lasts 1 (measure 2).'],
    ['an empty measure', [A + note(48), ''], 'An empty measure was read as a rest (measure 2).'],
    ['a tie without an end', [A + note(24, tie('start')) + rest(24)], 'A tie is begun and not ended: the notes are taken as they are written (measure 1).'],
    ['a tie to another note', [A + unpitched('E', 4, tie('start')) + unpitched('F', 4, tie('stop')) + rest(24)], 'A tie is ended and was not begun: the note is taken as struck (measure 1).'],
    ['a tie without a beginning', [A + note(48), note(48, tie('stop'))], 'A tie is ended and was not begun: the note is taken as struck (measure 2).'],
    ['grace notes', [A + note(48), '<note><grace/><unpitched/></note>' + note(48)], 'Grace notes were left out (measure 2).'],
    ['cues', [A + '<note><cue/><unpitched/><duration>24</duration></note>' + note(24)], 'Cue notes were left out (measure 1).'],
    ['pitches', [A + '<note><pitch><step>C</step><octave>4</octave></pitch><duration>48</duration></note>'], 'Pitches were left out.'],
    ['repeats', [A + note(48), note(48) + '<barline><repeat direction="backward"/></barline>'], 'Repeats are read once (measure 2).'],
    ['endings', [A + note(48) + '<barline><ending number="1" type="start"/></barline>'], 'First and second endings are read one after another (measure 1).'],
    ['jumps', [A + note(48) + '<direction><direction-type><words>D.C.</words></direction-type><sound dacapo="yes"/></direction>'], 'Jumps such as da capo are not followed (measure 1).'],
    ['signs for repeated measures', [A + note(48), '<attributes><measure-style><measure-repeat type="start">1</measure-repeat></measure-style></attributes>'], 'Signs that repeat a measure or a beat are not followed: what is written was read (measure 2).'],
    ['another metre', [A + note(48), attributes(12, '3/4') + note(36)], 'The metre changes to 3/4 (measure 2).'],
    ['a tuplet that its divisions cannot hold', [A.replace('12', '16') + '<note><unpitched/><duration>5</duration><type>eighth</type><time-modification><actual-notes>3</actual-notes><normal-notes>2</normal-notes></time-modification></note>' + rest(59)], 'A tuplet is rounded in the file: its lengths were taken as they stand (measure 1).'],
    ['going back too far', [A + note(48) + '<backup><duration>60</duration></backup>' + note(48, '<voice>2</voice>')], 'The file goes back beyond the beginning of a measure: its beginning was meant (measure 1).'],
    ['a note without a length', [A + note(48) + '<note><unpitched/></note>'], 'A note without a length was left out (measure 1).'],
    ['an overlap in one voice', [A + note(24) + '<backup><duration>12</duration></backup>' + note(36)], 'A note of the voice begins while another sounds: the earlier one was shortened (measure 1).'],
  ])('%s', async (_, measures, sentence) => {
    expect((await one(...measures)).warnings).toContain(sentence);
  });
  it('nothing, where nothing is', async () => {
    const { warnings } = await one(A + '<direction><sound tempo="84"/></direction>' + note(48));
    expect(warnings).toEqual([]);
  });
});

describe('metre, tempo and measures', () => {
  it('measures as they are printed, as long as they are', async () => {
    const xml = `<score-partwise><part-list/><part id="P1"><measure number="0" implicit="yes">${attributes(12, '3/4')}${note(12)}</measure><measure number="1">${note(36)}</measure><measure number="X1" implicit="yes">${note(12)}</measure></part></score-partwise>`;
    const { metre, measures, warnings } = (await fromMusicXML(xml))[0]!;
    expect(metre).toBe('3/4');
    expect(measures.map(({ number, start, length }) => [number, formatFraction(start), formatFraction(length)])).toEqual([['0', '0', '1/4'], ['1', '1/4', '3/4'], ['X1', '1', '1/4']]);
    expect(warnings.join()).not.toContain('not full');
  });
  it.each([
    ['<time><beats>3+2</beats><beat-type>8</beat-type></time>', 30, '3+2/8'],
    ['<time><beats>3</beats><beat-type>8</beat-type><beats>2</beats><beat-type>4</beat-type></time>', 42, '3+4/8'],
    ['<time><senza-misura/></time>', 13, '4/4'],
  ])('%s', async (time, duration, metre) => {
    expect((await one(`<attributes><divisions>12</divisions>${time}</attributes>${note(duration)}`)).metre).toBe(metre);
  });
  it.each([
    ['<direction-type><metronome><beat-unit>quarter</beat-unit><beat-unit-dot/><per-minute>84</per-minute></metronome></direction-type><sound tempo="126"/>', { beat: '3/8', perMinute: '84' }],
    ['<direction-type><metronome><beat-unit>quarter</beat-unit><per-minute>about 84</per-minute></metronome></direction-type><sound tempo="84.5"/>', { beat: '1/4', perMinute: '169/2' }],
    ['<direction-type><metronome><beat-unit>quarter</beat-unit><beat-unit-tied><beat-unit>16th</beat-unit></beat-unit-tied><per-minute>67 1/5</per-minute></metronome></direction-type>', { beat: '5/16', perMinute: '336/5' }],
    ['<direction-type><metronome><beat-unit>quarter</beat-unit><beat-unit>half</beat-unit></metronome></direction-type>', { beat: '1/4', perMinute: '120' }],
  ])('%s', async (inside, tempo) => {
    expect((await one(`${A}<direction>${inside}</direction>${note(48)}`)).tempo).toEqual(tempo);
  });
  it('a tempo of the first part is every part’s', async () => {
    const xml = musicXML([`${A}<direction><sound tempo="63"/></direction>${note(48)}`], { parts: `<part id="P2"><measure number="1">${A}${note(48)}</measure></part>` });
    expect((await fromMusicXML(xml)).map(({ tempo }) => tempo.perMinute)).toEqual(['63', '63']);
  });
});

describe('files', () => {
  const score = musicXML([A + note(48)], { name: 'Große Trommel – 太鼓' });
  const utf16 = (text: string, isBig: boolean) => {
    const bytes = Buffer.from(`\ufeff${text}`, 'utf16le');
    return new Uint8Array(isBig ? bytes.swap16() : bytes);
  };
  it.each<[string, string | Uint8Array, string]>([
    ['text', score, 'Große Trommel – 太鼓'],
    ['UTF-8', bytesOf(score), 'Große Trommel – 太鼓'],
    ['UTF-8 with a mark', bytesOf(`\ufeff${score}`), 'Große Trommel – 太鼓'],
    ['UTF-16, little end first', utf16(score, false), 'Große Trommel – 太鼓'],
    ['UTF-16, big end first', utf16(score, true), 'Große Trommel – 太鼓'],
    ['ISO-8859-1', new Uint8Array(Buffer.from(musicXML([A + note(48)], { name: 'Große Trommel', head: '<?xml version="1.0" encoding="ISO-8859-1"?>' }), 'latin1')), 'Große Trommel'],
    ['compressed', mxl(score), 'Große Trommel – 太鼓'],
    ['a document type without a subset', score.replace('<score', '<!DOCTYPE score-partwise PUBLIC "-//Recordare//DTD MusicXML 4.0 Partwise//EN" "http://www.musicxml.org/dtds/partwise.dtd"><score'), 'Große Trommel – 太鼓'],
  ])('%s', async (_, input, name) => expect(await read(input)).toEqual([[name, '1']]));

  it('an array buffer is taken as bytes', async () => expect(await fromMusicXML(new Uint8Array(bytesOf(score)).buffer as ArrayBuffer)).toHaveLength(1));

  it.each<[string, string | Uint8Array, string]>([
    ['nothing', '', 'This file is empty.'],
    ['spaces', '  \n', 'This file is empty.'],
    ['words', 'quarter eighth', 'This is no MusicXML: it begins with “q”, not with “<”.'],
    ['another XML', '<svg/>', 'its root is “svg”'],
    ['no part', '<score-partwise/>', 'This MusicXML holds no part.'],
    ['no note', musicXML([]), 'holds no note and no rest'],
    ['cut off', `${score.slice(0, -60)}`, 'This MusicXML is cut off: it ends in line 1'],
    ['not closed', score.replace('</measure>', ''), 'no well-formed MusicXML'],
    ['durations of words', musicXML([`${A}\n<note><unpitched/><duration>long</duration></note>`]), 'Measure 1: a duration is no number above 0.'],
    ['divisions of 0', musicXML([attributes(0)]), 'Measure 1: the number of divisions is no number above 0.'],
    ['lengths with nothing in common', musicXML([[99991, 99989, 99971, 99961].map((prime) => attributes(prime) + note(1)).join('')]), 'have too little in common'],
    ['another encoding', bytesOf(score.replace('?>', ' encoding="Shift_JIS"?>')), 'written in “Shift_JIS”'],
    ['UTF-8 that is none', new Uint8Array(Buffer.from(score.replace('–', '\u00e9'), 'latin1')), 'is no UTF-8'],
    ['MIDI', new Uint8Array(Buffer.from('MThd\0\0\0\u0006')), 'This is a MIDI file'],
  ])('%s is refused in a sentence', async (_, input, message) => {
    await expect(fromMusicXML(input)).rejects.toThrow(EngineError);
    await expect(fromMusicXML(input)).rejects.toThrow(message);
  });
});
