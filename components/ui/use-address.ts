import { useEffect, useRef } from 'react';

/** Longest address that is written: beyond, servers and people refuse it. */
const MOST = 6_000;

/** Keeps what a page shows in its address, so that a link opens it again; empty values are left out. As it was opened, it stays. */
export function useAddress(values: Readonly<Record<string, string>>): void {
  const query = new URLSearchParams(Object.entries(values).filter(([, value]) => value !== '')).toString();
  const written = useRef(query);
  useEffect(() => {
    if (query === written.current) return;
    const timer = setTimeout(() => {
      written.current = query;
      if (query.length <= MOST) window.history.replaceState(null, '', query === '' ? window.location.pathname : `?${query}`);
    }, 200);
    return () => clearTimeout(timer);
  }, [query]);
}
