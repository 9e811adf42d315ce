import { EngineError, type Study, buildStudy, parseStudy } from '@/engine';
import { MusicFileError } from './music-file';

/** Largest study document that is opened, in bytes: what the server keeps. */
export const STUDY_FILE_BYTES = 2 * 1024 * 1024;

/** Whether a file is a study document, by its first sign. */
export const isStudyFile = (bytes: Uint8Array): boolean => /^\s*\{/.test(new TextDecoder().decode(bytes.subarray(0, 256)));

const refuse = (message: string): never => {
  throw new MusicFileError(`This study was not opened. ${message}`);
};

function parseJson(bytes: Uint8Array): unknown {
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch {
    return refuse('It is no JSON that can be read: the file is damaged, cut off, or was changed by hand.');
  }
}

/**
 * A study from its own document, whole: what this version does not know is refused in words, and nothing is left out.
 * @throws MusicFileError with a sentence
 */
export function readStudyFile(bytes: Uint8Array): Study {
  if (bytes.length > STUDY_FILE_BYTES) refuse(`It is larger than ${STUDY_FILE_BYTES / 1024 / 1024} MB, which is the limit.`);
  const document = parseJson(bytes);
  const format = typeof document === 'object' && document !== null && 'format' in document ? document.format : undefined;
  if (typeof format === 'number' && format !== 1) refuse(`Another version of Sesqui wrote it (format ${format}), and this one cannot read it.`);
  try {
    const study = parseStudy(document);
    buildStudy(study);
    return study;
  } catch (error) {
    if (error instanceof EngineError) return refuse(error.code === 'unknown_field' ? error.message.replace(' The study is kept as it was.', ' Nothing was left out in silence: the file stays as it is.') : error.message);
    throw error;
  }
}
