/**
 * A short mark of a text, to know one's own text again: 106 bits from two passes of cyrb53 (a public-domain mixing of
 * two 32-bit multiplicative hashes), and the length. Not secret and not proof against someone who wants a clash; what
 * it decides is only whether a revision on the server is one that this browser sent.
 */
export function fingerprint(text: string): string {
  return `${text.length.toString(36)}-${mix(text, 0x9e3779b9)}-${mix(text, 0x85ebca6b)}`;
}

function mix(text: string, seed: number): string {
  let high = 0xdeadbeef ^ seed;
  let low = 0x41c6ce57 ^ seed;
  for (let index = 0; index < text.length; index += 1) {
    const code = text.charCodeAt(index);
    high = Math.imul(high ^ code, 2654435761);
    low = Math.imul(low ^ code, 1597334677);
  }
  high = Math.imul(high ^ (high >>> 16), 2246822507) ^ Math.imul(low ^ (low >>> 13), 3266489909);
  low = Math.imul(low ^ (low >>> 16), 2246822507) ^ Math.imul(high ^ (high >>> 13), 3266489909);
  return (4294967296 * (2097151 & low) + (high >>> 0)).toString(36);
}
