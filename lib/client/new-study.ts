import type { StudyInput } from '@/engine';
import { LOCAL_PREFIX, writeDraft } from './study-draft';

/** A new study begins as the smallest whole piece: a subject, two instruments, one section. */
export const blankStudy: StudyInput = {
  format: 1,
  title: 'Untitled study',
  metre: '4/4',
  tempo: { beat: '1/4', perMinute: '96' },
  subjects: [{ id: 'subject', name: 'Subject', rhythm: '3/8 1/8 1/4 1/4 | 1/8 1/8 1/2 (1/4)' }],
  instruments: [
    { id: 'claves', name: 'Claves', family: 'wood', sound: 'claves' },
    { id: 'frame-drum', name: 'Frame drum', family: 'skin', sound: 'frame-drum' },
  ],
  players: [],
  sections: [
    {
      id: 'opening',
      name: 'Opening',
      role: 'exposition',
      kind: 'process',
      subject: 'subject',
      process: { kind: 'proportion', factors: ['1', '3/2'], reading: 'forwards', entries: 'successive' },
      instruments: ['claves', 'frame-drum'],
    },
  ],
};

/** Begins a new study in this browser. @returns its id, or null where the browser does not let it be kept */
export function beginStudy(document: StudyInput = blankStudy): string | null {
  const id = `${LOCAL_PREFIX}${crypto.randomUUID().slice(0, 8)}`;
  const kept = writeDraft(id, { document, baseVersion: null, texts: {}, changedAt: new Date().toISOString() });
  return kept ? id : null;
}
