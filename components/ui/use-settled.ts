import { useEffect, useState } from 'react';

/** A value once it has not changed for a while, so that each letter that is typed does not ask the server. */
export function useSettled<T>(value: T, milliseconds = 250): T {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), milliseconds);
    return () => clearTimeout(timer);
  }, [value, milliseconds]);
  return settled;
}
