/** Remembers what it has worked out. */
export function remembered<T>(make: (index: number) => T): (index: number) => T {
  const known = new Map<number, T>();
  return (index) => {
    let made = known.get(index);
    if (made === undefined) known.set(index, (made = make(index)));
    return made;
  };
}
