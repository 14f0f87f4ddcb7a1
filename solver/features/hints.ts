import type { ResonanceHint } from '../analysis/adaptive-frequencies';
import type { PolesAndZeros, Root } from '../analysis/poles-and-zeros';

/** One part in 10⁹ stands for the width of what has no losses. */
const NARROWEST = 1e-9;

/**
 * Hints from poles and zeros, the cancelled ones left out: at |Im s|/2π a pole or zero makes the response change over
 * |Re s|/π; a real one at |s|/2π over as much.
 */
export function hintsOf({ poles, zeros }: Pick<PolesAndZeros, 'poles' | 'zeros'>): readonly ResonanceHint[] {
  return [...poles, ...zeros].flatMap((root) => hintOf(root) ?? []);
}

function hintOf({ s, frequency }: Root): ResonanceHint | undefined {
  if (frequency === 0 || s.im < 0) return undefined;
  if (s.im === 0) return { frequency, width: frequency };
  const at = s.im / (2 * Math.PI);
  return { frequency: at, width: Math.max(Math.abs(s.re) / Math.PI, NARROWEST * at) };
}
