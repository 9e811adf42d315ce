/**
 * Where to go after signing in: an address of ours, or the list of studies. Whatever could lead to another site is not
 * followed: a second slash, a backslash, which browsers read as one, or a character that they leave out.
 */
export function nextAddress(given: unknown): string {
  return typeof given === 'string' && given.length <= 500 && /^\/(?![/\\])[\w\-./?=&%~]*$/.test(given) ? given : '/studies';
}
