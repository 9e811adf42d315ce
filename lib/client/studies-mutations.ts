import { mutationOptions } from '@tanstack/react-query';
import type { StudyInput } from '@/engine';
import { studyResponse } from '../schemas/studies';
import { sendJson } from './get-json';
import type { SaveRequest, Saved } from './study-saver';

/** Saves an own study. It runs without asking whether the browser thinks that it is online: the saver waits by itself. */
export const saveStudyMutation = (id: string) =>
  mutationOptions({
    mutationKey: ['studies', id, 'save'],
    mutationFn: async (request: SaveRequest): Promise<Saved> => {
      const body = await sendJson(`/api/studies/${encodeURIComponent(id)}`, { method: 'PUT', body: request });
      return studyResponse.parse(body).study;
    },
    networkMode: 'always',
    retry: false,
  });

/** Puts a document into the account as a new study; the same `saveId` again makes no second one. */
export const createStudyMutation = () =>
  mutationOptions({
    mutationKey: ['studies', 'create'],
    mutationFn: async (request: { readonly document: StudyInput; readonly saveId: string }) => {
      const body = await sendJson('/api/studies', { method: 'POST', body: request });
      return studyResponse.parse(body).study;
    },
    networkMode: 'always',
    retry: false,
  });
