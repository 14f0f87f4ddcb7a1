/** The fault of a frequency, in words, or undefined. */
export function faultOfFrequency(frequency: unknown): string | undefined {
  if (typeof frequency !== 'number' || !Number.isFinite(frequency))
    return 'The frequency must be a finite number of hertz.';
  return frequency < 0 ? 'The frequency must not be negative.' : undefined;
}
