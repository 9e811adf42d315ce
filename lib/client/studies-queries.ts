import { infiniteQueryOptions, keepPreviousData, queryOptions } from '@tanstack/react-query';
import {
  ownStudyListResponse, studyListResponse, studyResponse, versionListResponse, versionResponse,
  type OwnStudyListWire, type StudyListWire, type StudySort, type StudyWire, type VersionListWire, type VersionWire,
} from '../schemas/studies';
import { getJson } from './get-json';

/** The demo studies, for lists. The cache holds what came; pages get dates as `Date`. */
export const studyListQuery = () =>
  queryOptions({
    queryKey: ['studies'],
    queryFn: async ({ signal }) => (await getJson('/api/studies', { signal })) as StudyListWire,
    select: (body) => studyListResponse.parse(body).studies,
  });

export type OwnList = { readonly q: string; readonly sort: StudySort; readonly isDeleted: boolean };

/** The reader's own studies, page by page. */
export const ownStudyListQuery = ({ q, sort, isDeleted }: OwnList) =>
  infiniteQueryOptions({
    queryKey: ['studies', 'own', { q, sort, isDeleted }],
    queryFn: async ({ pageParam, signal }) => {
      const asked = new URLSearchParams({ list: 'own', q, sort, deleted: String(isDeleted), ...(pageParam && { cursor: pageParam }) });
      return (await getJson(`/api/studies?${asked}`, { signal })) as OwnStudyListWire;
    },
    initialPageParam: '',
    getNextPageParam: ({ nextCursor }) => nextCursor ?? undefined,
    select: ({ pages }) => pages.flatMap((page) => ownStudyListResponse.parse(page).studies),
    placeholderData: keepPreviousData,
  });

/** One study by its id or its readable name. */
export const studyQuery = (id: string) =>
  queryOptions({
    queryKey: ['studies', id],
    queryFn: async ({ signal }) => (await getJson(`/api/studies/${encodeURIComponent(id)}`, { signal })) as StudyWire,
    select: (body) => studyResponse.parse(body).study,
  });

/** The kept versions of a study, the newest first, page by page. */
export const versionListQuery = (id: string) =>
  infiniteQueryOptions({
    queryKey: ['studies', id, 'versions'],
    queryFn: async ({ pageParam, signal }) => {
      const place = pageParam ? `?${new URLSearchParams({ cursor: pageParam })}` : '';
      return (await getJson(`/api/studies/${encodeURIComponent(id)}/versions${place}`, { signal })) as VersionListWire;
    },
    initialPageParam: '',
    getNextPageParam: ({ nextCursor }) => nextCursor ?? undefined,
    select: ({ pages }) => pages.flatMap((page) => versionListResponse.parse(page).versions),
  });

/** One kept version, which never changes. */
export const versionQuery = (id: string, version: number) =>
  queryOptions({
    queryKey: ['studies', id, 'versions', version],
    queryFn: async ({ signal }) => (await getJson(`/api/studies/${encodeURIComponent(id)}/versions/${version}`, { signal })) as VersionWire,
    select: (body) => versionResponse.parse(body).version,
    staleTime: Infinity,
  });
