/** Kinds of files that leave a study, by their extension, and what each is called on the wire (IANA media types). */
export const FILE_TYPES = {
  musicxml: 'application/vnd.recordare.musicxml+xml',
  mxl: 'application/vnd.recordare.musicxml',
  mid: 'audio/midi',
  pdf: 'application/pdf',
  csv: 'text/csv; charset=utf-8',
  json: 'application/json',
  zip: 'application/zip',
} as const;
export type FileKind = keyof typeof FILE_TYPES;
