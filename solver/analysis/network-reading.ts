import type { Network } from './network';
import { REFERENCE, rowOf } from './network';
import type { Problem } from './problem';
import { invalid, isProblem } from './problem';

/** A voltage (V rms) or a current (A rms) of a network, as every analysis names it. */
export type NetworkReading =
  /** Of a node over the reference node. */
  | { readonly quantity: 'voltage'; readonly node: string }
  /** Of the first node over the second. */
  | { readonly quantity: 'voltageBetween'; readonly nodes: readonly [string, string] }
  /** Of an element's first node over its second, or of another of its ports, counted from 0. */
  | { readonly quantity: 'elementVoltage'; readonly element: string; readonly port?: number }
  /** Through an element, entering at its first node, or at that of another of its ports. */
  | { readonly quantity: 'current'; readonly element: string; readonly port?: number };

/** A reading by numbers; `row` is that of the element whose voltage it is. */
export type Phasor =
  | { readonly kind: 'between'; readonly one: number; readonly other: number; readonly row?: number }
  | { readonly kind: 'current'; readonly row: number };

/** Looks up the names in a reading. */
export function resolveReading(network: Network, reading: NetworkReading): Phasor | Problem {
  switch (reading.quantity) {
    case 'voltage': {
      const one = nodeNamed(network, reading.node);
      return isProblem(one) ? one : { kind: 'between', one, other: REFERENCE };
    }
    case 'voltageBetween': {
      const pair = nodesNamed(network, reading.nodes);
      return isProblem(pair) ? pair : { kind: 'between', one: pair[0], other: pair[1] };
    }
    case 'elementVoltage': {
      const row = rowNamed(network, reading.element, reading.port);
      if (isProblem(row)) return row;
      return { kind: 'between', one: network.first[row] ?? 0, other: network.second[row] ?? 0, row };
    }
    case 'current': {
      const row = rowNamed(network, reading.element, reading.port);
      return isProblem(row) ? row : { kind: 'current', row };
    }
  }
}

/** The number of a node. */
export function nodeNamed({ nodeIndex }: Network, node: string): number | Problem {
  return nodeIndex.get(node) ?? invalid(`There is no node ${node} in the element list.`);
}

/** The numbers of two nodes. */
export function nodesNamed(network: Network, [first, second]: readonly [string, string]): readonly [number, number] | Problem {
  const one = nodeNamed(network, first);
  if (isProblem(one)) return one;
  const other = nodeNamed(network, second);
  return isProblem(other) ? other : [one, other];
}

/** The numbers of two nodes between which something is connected, so that they must not be one. */
export function portNamed(network: Network, nodes: readonly [string, string]): readonly [number, number] | Problem {
  const pair = nodesNamed(network, nodes);
  if (isProblem(pair) || pair[0] !== pair[1]) return pair;
  return invalid(`Both nodes are ${nodes[0]}; choose two different nodes.`, [nodes[0]]);
}

/** The row of an element's port. */
export function rowNamed(network: Network, id: string, port = 0): number | Problem {
  const row = rowOf(network, id, port);
  if (row >= 0) return row;
  return network.elementIndex.has(id) ? invalid(`Element ${id} has no port ${port}; they are counted from 0.`) : noElement(id);
}

export function noElement(id: string): Problem {
  return invalid(`There is no element ${id} in the element list.`);
}

/** The row of an independent source. */
export function sourceNamed(network: Network, id: string): number | Problem {
  const row = rowNamed(network, id);
  if (isProblem(row)) return row;
  const law = network.laws[row]?.law;
  if (law === 'voltage' || law === 'current') return row;
  return invalid(
    `${id} is not an independent source, so nothing can be given in terms of its value. Name a voltage or a current source.`,
    [],
    [id],
  );
}
