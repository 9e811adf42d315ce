import { describe, expect, it } from 'vitest';
import { parseStudy } from '@/engine';
import { demoStudies } from '@/db/demo';
import { MusicFileError } from '@/lib/client/music-file';
import { blankStudy } from '@/lib/client/new-study';
import { STUDY_FILE_BYTES, isStudyFile, readStudyFile } from '@/lib/client/study-file';
import { bytesOf } from '../helpers/music-files';

const json = (value: unknown) => bytesOf(JSON.stringify(value, null, 1));

describe('a study’s own file', () => {
  it.each(demoStudies.map(({ slug, study }) => [slug, study] as const))('%s comes back whole', (_, document) => {
    expect(isStudyFile(json(document))).toBe(true);
    expect(readStudyFile(json(parseStudy(document)))).toEqual(parseStudy(document));
  });

  it.each<[string, Uint8Array, string]>([
    ['half of one', json(blankStudy).slice(0, 200), 'It is no JSON that can be read'],
    ['in another encoding', new Uint8Array(Buffer.from(JSON.stringify({ ...blankStudy, title: 'Flöße' }), 'latin1')), 'It is no JSON that can be read'],
    ['no study', json({ hello: 1 }), 'This is not a study that can be read.'],
    ['a study of another format', json({ ...blankStudy, format: 2 }), 'Another version of Sesqui wrote it (format 2)'],
    ['a field that is not known', json({ ...blankStudy, colour: 'blue' }), '“colour” in the study is not known to this version. Nothing was left out in silence: the file stays as it is.'],
    ['music that cannot be built', json({ ...blankStudy, subjects: [] }), 'This study was not opened.'],
    ['too large', json({ ...blankStudy, title: 'x'.repeat(STUDY_FILE_BYTES) }), 'It is larger than 2 MB'],
  ])('%s is refused in a sentence', (_, bytes, message) => {
    expect(() => readStudyFile(bytes)).toThrow(MusicFileError);
    expect(() => readStudyFile(bytes)).toThrow(message);
  });

  it('is told from MusicXML and rhythm text', () => expect(['<score-partwise/>', '1/4 1/8', '[1/4]x3', '{'].map((text) => isStudyFile(bytesOf(text)))).toEqual([false, false, false, true]));
});
