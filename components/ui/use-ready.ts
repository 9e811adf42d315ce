'use client';

import { useSyncExternalStore } from 'react';

const never = (): (() => void) => () => undefined;

/** Whether the page listens yet: what is typed into a field before that would be lost. */
export const useReady = (): boolean => useSyncExternalStore(never, () => true, () => false);
