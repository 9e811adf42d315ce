import { studyResponse } from '../schemas/studies';
import { sendJson } from './get-json';
import { deleteDraft, listDrafts, readDraft } from './study-draft';

const ID_KEY = 'sesqui.move.';

/** An id for moving a draft that stays the same until the draft is gone, so that a move that is tried again counts once. */
function moveId(id: string): string {
  const known = localStorage.getItem(ID_KEY + id);
  if (known) return known;
  const made = crypto.randomUUID();
  localStorage.setItem(ID_KEY + id, made);
  return made;
}

export type Moved = { readonly from: string; readonly id: string; readonly title: string };

/**
 * Moves one draft of this browser into the signed-in account, and lets the draft go only once it is there.
 * @throws ApiError where the server does not take it; the draft stays
 */
export async function moveDraft(id: string): Promise<Moved | null> {
  const read = readDraft(id);
  if (read.kind !== 'draft') return null;
  const body = await sendJson('/api/studies', { method: 'POST', body: { document: read.draft.document, saveId: moveId(id) } });
  const { study } = studyResponse.parse(body);
  deleteDraft(id);
  localStorage.removeItem(ID_KEY + id);
  return { from: id, id: study.id, title: study.title };
}

/** Moves what a guest began or changed in this browser into the account. Own studies' unsaved changes are not theirs to move. */
export async function moveDrafts(isGuestDraft: (id: string) => boolean): Promise<Moved[]> {
  const moved: Moved[] = [];
  for (const { id } of listDrafts()) {
    if (!isGuestDraft(id)) continue;
    const one = await moveDraft(id);
    if (one) moved.push(one);
  }
  return moved;
}
