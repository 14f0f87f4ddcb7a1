import type { Element } from '@/solver';
import { TWO_PI } from '../parts/read-values';
import type { Phasor } from './phasor';

/** What an element is at a frequency: ohms, or one of the two that no number stands for. */
export type ElementImpedance =
  | { readonly kind: 'ohms'; readonly ohms: Phasor }
  /** No current passes, whatever the voltage. */
  | { readonly kind: 'open' }
  /** No voltage stands across it, whatever the current. */
  | { readonly kind: 'closed' };

/**
 * The impedance of a passive element from its own value: R, jωL, 1/(jωC). Not from its readings, which may both be
 * zero. `null` for what has none of its own: a source, and an element with further pins.
 */
export function impedanceOf(element: Element, frequencyHz: number): ElementImpedance | null {
  const omega = TWO_PI * frequencyHz;
  switch (element.kind) {
    case 'resistor':
      return element.resistance === 0 ? { kind: 'closed' } : ohms(element.resistance, 0);
    case 'inductor': {
      const reactance = omega * element.inductance;
      return reactance === 0 ? { kind: 'closed' } : ohms(0, reactance);
    }
    case 'capacitor': {
      const susceptance = omega * element.capacitance;
      return susceptance === 0 ? { kind: 'open' } : ohms(0, -1 / susceptance);
    }
    default:
      return null;
  }
}

function ohms(re: number, im: number): ElementImpedance {
  return { kind: 'ohms', ohms: { re, im } };
}
