/** SI prefixes from atto to exa by their power of ten. Case counts: `m` is milli and `M` is mega, always. */
const PREFIX_BY_EXPONENT: ReadonlyMap<number, string> = new Map([
  [-18, 'a'],
  [-15, 'f'],
  [-12, 'p'],
  [-9, 'n'],
  [-6, 'µ'],
  [-3, 'm'],
  [0, ''],
  [3, 'k'],
  [6, 'M'],
  [9, 'G'],
  [12, 'T'],
  [15, 'P'],
  [18, 'E'],
]);

/** As typed: `u` stands in for µ, and `K` for kilo, which is how IEC 60062 writes it in a marking code. */
const EXPONENT_BY_TYPED: ReadonlyMap<string, number> = new Map([
  ...[...PREFIX_BY_EXPONENT]
    .filter(([, prefix]) => prefix !== '')
    .map(([exponent, prefix]) => [prefix, exponent] as const),
  ['u', -6],
  ['K', 3],
]);

/** The prefix for a power of ten that is a multiple of three from −18 to 18, or undefined outside. */
export function prefixOfExponent(exponent: number): string | undefined {
  return PREFIX_BY_EXPONENT.get(exponent);
}

/** The power of ten of a prefix as typed, or undefined if it is none. */
export function exponentOfPrefix(typed: string): number | undefined {
  return EXPONENT_BY_TYPED.get(typed);
}
