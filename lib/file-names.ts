/** Characters that a file's name may not have on one system or another, and those that turn the direction of reading. */
const FORBIDDEN = /[\u0000-\u001f\u007f-\u009f"*/:<>?\\|\u200b-\u200f\u2028-\u202e\u2066-\u2069\ufeff]/g;
const RESERVED = /^(?:con|prn|aux|nul|com\d|lpt\d)$/i;
const LONGEST = 100;

/**
 * The name of a file from what it holds, for any system.
 * @param parts - such as a title and a player's name
 * @param extension - without its dot
 */
export function fileName(parts: readonly string[], extension: string): string {
  const words = parts.map((part) => part.replaceAll(FORBIDDEN, ' ').replaceAll(/\s+/g, ' ').trim()).filter((part) => part !== '');
  const base = [...words.join(' - ')].slice(0, LONGEST).join('').replaceAll(/^[. ]+|[. ]+$/g, '');
  return `${base === '' || RESERVED.test(base) ? `Study ${base}`.trim() : base}.${extension}`;
}

/** Names made different where they are the same, in whatever case: “Bells.pdf”, “Bells (2).pdf”. */
export function distinctNames(names: readonly string[]): string[] {
  const used = new Set<string>();
  return names.map((name) => {
    const [base, extension] = [name.slice(0, name.lastIndexOf('.')), name.slice(name.lastIndexOf('.'))];
    let free = name;
    for (let n = 2; used.has(free.toLowerCase()); n += 1) free = `${base} (${n})${extension}`;
    used.add(free.toLowerCase());
    return free;
  });
}
