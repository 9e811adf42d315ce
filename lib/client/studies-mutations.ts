import { mutationOptions } from '@tanstack/react-query';
import type { StudyInput } from '@/engine';
import { studyListItemResponse, studyResponse } from '../schemas/studies';
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

const path = (id: string, rest = ''): string => `/api/studies/${encodeURIComponent(id)}${rest}`;

/** Another title, which is a new version on top of `baseVersion`. */
export const renameStudyMutation = () =>
  mutationOptions({
    mutationKey: ['studies', 'rename'],
    mutationFn: async ({ id, title, baseVersion }: { readonly id: string; readonly title: string; readonly baseVersion: number }) =>
      studyResponse.parse(await sendJson(path(id), { method: 'PATCH', body: { title, baseVersion } })).study,
  });

/** A new study of the reader's own, from one of theirs or a demonstration. */
export const copyStudyMutation = () =>
  mutationOptions({
    mutationKey: ['studies', 'copy'],
    mutationFn: async ({ id, saveId }: { readonly id: string; readonly saveId: string }) =>
      studyResponse.parse(await sendJson(path(id, '/copy'), { method: 'POST', body: { saveId } })).study,
  });

/** Throws a study away; it can be restored for a while. */
export const deleteStudyMutation = () =>
  mutationOptions({
    mutationKey: ['studies', 'delete'],
    mutationFn: async ({ id }: { readonly id: string }) => studyListItemResponse.parse(await sendJson(path(id), { method: 'DELETE' })).study,
  });

export const restoreStudyMutation = () =>
  mutationOptions({
    mutationKey: ['studies', 'restore'],
    mutationFn: async ({ id }: { readonly id: string }) => studyListItemResponse.parse(await sendJson(path(id, '/restore'), { method: 'POST' })).study,
  });
