/**
 * Frequencies from the first to the last, both included exactly, evenly spaced.
 *
 * @param count at least 2; fewer give the first alone, or nothing
 */
export function linearFrequencies(firstHz: number, lastHz: number, count: number): Float64Array {
  return grid(firstHz, lastHz, count, (part) => firstHz + part * (lastHz - firstHz));
}

/** Frequencies above zero from the first to the last, both included exactly, evenly spaced on a logarithmic scale. */
export function logarithmicFrequencies(firstHz: number, lastHz: number, count: number): Float64Array {
  // Not by the ratio of the two, which may be beyond the range of numbers.
  const span = Math.log(lastHz) - Math.log(firstHz);
  return grid(firstHz, lastHz, count, (part) => firstHz * Math.exp(0.5 * part * span) * Math.exp(0.5 * part * span));
}

/** The frequencies of several lists, rising, each once. */
export function listedFrequencies(...lists: readonly ArrayLike<number>[]): Float64Array {
  const all = new Set(lists.flatMap((list) => Array.from(list)));
  return Float64Array.from(all).sort();
}

function grid(firstHz: number, lastHz: number, count: number, at: (part: number) => number): Float64Array {
  const frequencies = new Float64Array(Math.max(0, Math.floor(count)));
  for (let place = 0; place < frequencies.length; place++) frequencies[place] = at(place / (frequencies.length - 1));
  if (frequencies.length > 0) frequencies[0] = firstHz;
  if (frequencies.length > 1) frequencies[frequencies.length - 1] = lastHz;
  return frequencies;
}
