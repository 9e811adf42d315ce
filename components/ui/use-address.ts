import { useEffect } from 'react';

/** Longest address that is written: beyond, servers and people refuse it. */
const MOST = 6_000;

/** Keeps what a page shows in its address, so that a link opens it again; empty values are left out. */
export function useAddress(values: Readonly<Record<string, string>>): void {
  const query = new URLSearchParams(Object.entries(values).filter(([, value]) => value !== '')).toString();
  useEffect(() => {
    const timer = setTimeout(() => {
      if (query.length <= MOST) window.history.replaceState(null, '', query === '' ? window.location.pathname : `?${query}`);
    }, 200);
    return () => clearTimeout(timer);
  }, [query]);
}
