import { mutationOptions, queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import { accountResponse, type AccountWire, type changePasswordBody, type registerBody, type updateAccountBody } from '../schemas/account';
import { getJson, sendJson } from './get-json';

/** The reader's own account. */
export const accountQuery = () =>
  queryOptions({
    queryKey: ['account'],
    queryFn: async ({ signal }) => (await getJson('/api/account', { signal })) as AccountWire,
    select: (body) => accountResponse.parse(body).account,
  });

/** Makes an account; the answer is the same whether the address was known or not. */
export const registerMutation = () =>
  mutationOptions({
    mutationKey: ['account', 'register'],
    mutationFn: (body: z.input<typeof registerBody>) => sendJson('/api/register', { method: 'POST', body }),
  });

export const updateAccountMutation = () =>
  mutationOptions({
    mutationKey: ['account', 'update'],
    mutationFn: async (body: z.input<typeof updateAccountBody>) => (await sendJson('/api/account', { method: 'PATCH', body })) as AccountWire,
  });

/** A new password; every other session ends. */
export const changePasswordMutation = () =>
  mutationOptions({
    mutationKey: ['account', 'password'],
    mutationFn: (body: z.input<typeof changePasswordBody>) => sendJson('/api/account/password', { method: 'POST', body }),
  });

export const signOutEverywhereMutation = () =>
  mutationOptions({
    mutationKey: ['account', 'sign-out-everywhere'],
    mutationFn: () => sendJson('/api/account/sign-out-everywhere', { method: 'POST' }),
  });
