import type { Network } from './network';
import { REFERENCE, rowOf } from './network';
import type { Problem } from './problem';
import { problem } from './problem';

/** A voltage (V rms) or a current (A rms) of the network as its sources drive it. */
export type SweepPhasor =
  /** Of a node over the reference node. */
  | { readonly quantity: 'voltage'; readonly node: string }
  /** Of the first node over the second. */
  | { readonly quantity: 'voltageBetween'; readonly nodes: readonly [string, string] }
  /** Of an element's first node over its second, or of another of its ports, counted from 0. */
  | { readonly quantity: 'elementVoltage'; readonly element: string; readonly port?: number }
  /** Through an element, entering at its first node, or at that of another of its ports. */
  | { readonly quantity: 'current'; readonly element: string; readonly port?: number };

/** What can be differentiated. */
export type SweepTransfer =
  | SweepPhasor
  /**
   * Ohms, or siemens, between two nodes, of which the second may be the reference node: every independent source dead
   * (a voltage source an ideal connection, a current source open), one ampere sent into the first and out of the second.
   */
  | { readonly quantity: 'impedance'; readonly nodes: readonly [string, string] }
  | { readonly quantity: 'admittance'; readonly nodes: readonly [string, string] }
  /** The one over the other. */
  | { readonly quantity: 'ratio'; readonly of: SweepPhasor; readonly to: SweepPhasor };

/** What is recorded at each frequency. */
export type SweepOutput =
  | SweepTransfer
  /** The complex power V·I* that an element absorbs, over all its ports, VA. */
  | { readonly quantity: 'power'; readonly element: string }
  /** −d(phase)/dω, seconds; real. Exact, by the adjoint: neither differences nor unwrapped phases. */
  | { readonly quantity: 'groupDelay'; readonly of: SweepTransfer }
  /** The derivative by the value of a resistor, capacitor or inductor, per ohm, farad or henry. */
  | { readonly quantity: 'derivative'; readonly of: SweepTransfer; readonly element: string };

/** A phasor by numbers. */
export type Phasor =
  | { readonly kind: 'between'; readonly one: number; readonly other: number; readonly row?: number }
  | { readonly kind: 'current'; readonly row: number };

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
      const row = rowOf(network, output.element);
      if (row < 0) return noElement(output.element);
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
      const [one, other] = output.nodes.map((node) => network.nodeIndex.get(node));
      if (one === undefined) return noNode(output.nodes[0]);
      if (other === undefined) return noNode(output.nodes[1]);
      if (one === other) return invalid(`An impedance is between two nodes, and node ${output.nodes[0]} is one.`);
      return { kind: 'impedance', one, other, inverse: output.quantity === 'admittance' };
    }
    case 'ratio': {
      const of = resolvePhasor(network, output.of);
      if (isProblem(of)) return of;
      const to = resolvePhasor(network, output.to);
      return isProblem(to) ? to : { kind: 'ratio', of, to };
    }
    default:
      return resolvePhasor(network, output);
  }
}

function resolvePhasor(network: Network, output: SweepPhasor): Phasor | Problem {
  switch (output.quantity) {
    case 'voltage': {
      const one = network.nodeIndex.get(output.node);
      return one === undefined ? noNode(output.node) : { kind: 'between', one, other: REFERENCE };
    }
    case 'voltageBetween': {
      const [one, other] = output.nodes.map((node) => network.nodeIndex.get(node));
      if (one === undefined) return noNode(output.nodes[0]);
      if (other === undefined) return noNode(output.nodes[1]);
      return { kind: 'between', one, other };
    }
    case 'elementVoltage': {
      const row = rowOf(network, output.element, output.port);
      if (row < 0) return noPort(network, output.element, output.port);
      return { kind: 'between', one: network.first[row] ?? 0, other: network.second[row] ?? 0, row };
    }
    case 'current': {
      const row = rowOf(network, output.element, output.port);
      return row < 0 ? noPort(network, output.element, output.port) : { kind: 'current', row };
    }
  }
}

export function isProblem(found: object): found is Problem {
  return 'ok' in found;
}

export function invalid(message: string): Problem {
  return problem('invalid', [], [], message);
}

function noNode(node: string): Problem {
  return invalid(`There is no node ${node} in the element list.`);
}

function noElement(id: string): Problem {
  return invalid(`There is no element ${id} in the element list.`);
}

function noPort(network: Network, id: string, port = 0): Problem {
  return network.elementIndex.has(id) ? invalid(`Element ${id} has no port ${port}; they are counted from 0.`) : noElement(id);
}
