import type { Network } from './network';
import type { NetworkReading, Phasor } from './network-reading';
import { noElement, portNamed, resolveReading, rowNamed } from './network-reading';
import type { Problem } from './problem';
import { invalid, isProblem } from './problem';

/** What can be differentiated. */
export type SweepTransfer =
  | NetworkReading
  /**
   * Ohms, or siemens, between two nodes, of which the second may be the reference node: every independent source dead
   * (a voltage source an ideal connection, a current source open), one ampere sent into the first and out of the second.
   */
  | { readonly quantity: 'impedance'; readonly nodes: readonly [string, string] }
  | { readonly quantity: 'admittance'; readonly nodes: readonly [string, string] }
  /** The one over the other. */
  | { readonly quantity: 'ratio'; readonly of: NetworkReading; readonly to: NetworkReading };

/** What is recorded at each frequency. */
export type SweepOutput =
  | SweepTransfer
  /** The complex power V·I* that an element absorbs, over all its ports, VA. */
  | { readonly quantity: 'power'; readonly element: string }
  /** −d(phase)/dω, seconds; real. Exact, by the adjoint: neither differences nor unwrapped phases. */
  | { readonly quantity: 'groupDelay'; readonly of: SweepTransfer }
  /** The derivative by the value of a resistor, capacitor or inductor, per ohm, farad or henry. */
  | { readonly quantity: 'derivative'; readonly of: SweepTransfer; readonly element: string };

/** A transfer by numbers. */
export type Transfer =
  | Phasor
  | { readonly kind: 'impedance'; readonly one: number; readonly other: number; readonly inverse: boolean }
  | { readonly kind: 'ratio'; readonly of: Phasor; readonly to: Phasor };

/** An output by numbers. */
export type Output =
  | { readonly kind: 'transfer'; readonly transfer: Transfer }
  | { readonly kind: 'power'; readonly rows: readonly number[] }
  | { readonly kind: 'groupDelay'; readonly of: Transfer }
  | { readonly kind: 'derivative'; readonly of: Transfer; readonly row: number };

/** Looks up the names in an output. */
export function resolveOutput(network: Network, output: SweepOutput): Output | Problem {
  switch (output.quantity) {
    case 'power': {
      const place = network.elementIndex.get(output.element);
      if (place === undefined) return noElement(output.element);
      const start = network.rowStart[place] ?? 0;
      const end = network.rowStart[place + 1] ?? start;
      return { kind: 'power', rows: Array.from({ length: end - start }, (_, port) => start + port) };
    }
    case 'groupDelay': {
      const of = resolveTransfer(network, output.of);
      return isProblem(of) ? of : { kind: 'groupDelay', of };
    }
    case 'derivative': {
      const of = resolveTransfer(network, output.of);
      if (isProblem(of)) return of;
      const row = rowNamed(network, output.element);
      if (isProblem(row)) return row;
      switch (network.laws[row]?.law) {
        case 'resistance':
        case 'capacitance':
        case 'inductance':
          return { kind: 'derivative', of, row };
        default:
          return invalid(
            `The derivative by ${output.element} is not there: it is taken by the value, other than zero, of a resistor, a capacitor or an inductor.`,
          );
      }
    }
    default: {
      const transfer = resolveTransfer(network, output);
      return isProblem(transfer) ? transfer : { kind: 'transfer', transfer };
    }
  }
}

function resolveTransfer(network: Network, output: SweepTransfer): Transfer | Problem {
  switch (output.quantity) {
    case 'impedance':
    case 'admittance': {
      const pair = portNamed(network, output.nodes);
      if (isProblem(pair)) return pair;
      return { kind: 'impedance', one: pair[0], other: pair[1], inverse: output.quantity === 'admittance' };
    }
    case 'ratio': {
      const of = resolveReading(network, output.of);
      if (isProblem(of)) return of;
      const to = resolveReading(network, output.to);
      return isProblem(to) ? to : { kind: 'ratio', of, to };
    }
    default:
      return resolveReading(network, output);
  }
}
