import { queryOptions } from '@tanstack/react-query';
import { studyListResponse, studyResponse, type StudyListWire, type StudyWire } from '../schemas/studies';
import { getJson } from './get-json';

/** The demo studies, for lists. The cache holds what came; pages get dates as `Date`. */
export const studyListQuery = () =>
  queryOptions({
    queryKey: ['studies'],
    queryFn: async ({ signal }) => (await getJson('/api/studies', { signal })) as StudyListWire,
    select: (body) => studyListResponse.parse(body).studies,
  });

/** One study by its id or its readable name. */
export const studyQuery = (id: string) =>
  queryOptions({
    queryKey: ['studies', id],
    queryFn: async ({ signal }) => (await getJson(`/api/studies/${encodeURIComponent(id)}`, { signal })) as StudyWire,
    select: (body) => studyResponse.parse(body).study,
  });
