/**
 * Where to go after signing in: a path of this site, whatever stands in the address. A second slash or a backslash
 * would make a browser read a host of someone else's, and it drops control characters before it looks.
 */
export function safeNext(next: string | null | undefined, otherwise = '/sheets'): string {
  if (next === null || next === undefined || next.length > 500) return otherwise;
  return /^\/(?![/\\])[^\\\p{Cc}]*$/u.test(next) ? next : otherwise;
}
