import { infiniteQueryOptions, keepPreviousData, mutationOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import { peopleResponse, type PeopleWire, personResponse, type updatePersonBody } from '../schemas/people';
import { getJson, sendJson } from './get-json';

/** Accounts in order of address, page by page; for administrators. */
export const peopleQuery = (q: string) =>
  infiniteQueryOptions({
    queryKey: ['people', q],
    queryFn: async ({ pageParam, signal }) => (await getJson(`/api/people?${new URLSearchParams({ q, ...(pageParam && { cursor: pageParam }) })}`, { signal })) as PeopleWire,
    initialPageParam: '',
    getNextPageParam: ({ nextCursor }) => nextCursor ?? undefined,
    select: ({ pages }) => pages.flatMap((page) => peopleResponse.parse(page).people),
    placeholderData: keepPreviousData,
  });

/** Another's role, or whether their account is open. */
export const updatePersonMutation = () =>
  mutationOptions({
    mutationKey: ['people', 'update'],
    mutationFn: async ({ id, ...body }: z.input<typeof updatePersonBody> & { readonly id: string }) =>
      personResponse.parse(await sendJson(`/api/people/${id}`, { method: 'PATCH', body })).person,
  });
