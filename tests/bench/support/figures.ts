/** Prints a figure as the bench command expects it: one object a line. */
export function print(area: string, name: string, value: number, unit: string): void {
  console.log(JSON.stringify({ area, name, value, unit }));
}

/**
 * The value below or at which a share of the samples lies, by nearest rank: a value that was really measured.
 * @param share 0 to 1
 * @throws when there is no sample
 */
export function percentile(samples: readonly number[], share: number): number {
  const sorted = [...samples].sort((a, b) => a - b);
  const value = sorted[Math.max(0, Math.ceil(share * sorted.length) - 1)];
  if (value === undefined) throw new Error('nothing was measured');
  return value;
}

export const median = (samples: readonly number[]) => percentile(samples, 0.5);
