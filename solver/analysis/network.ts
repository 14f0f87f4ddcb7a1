import { BranchTable } from '../elements/branch-table';
import type { Element, ElementList } from '../elements/element-list';
import { REFERENCE_NODE } from '../elements/element-list';
import type { Law } from '../elements/law';
import { lawsOf, portsOf } from '../elements/registry';

/**
 * An element list by numbers: nodes and ports as indices, the reference node first whether it is used or not. A *row*
 * is a port of an element; the rows of an element follow each other.
 */
export interface Network {
  readonly elements: readonly Element[];
  readonly nodeNames: readonly string[];
  readonly nodeIndex: ReadonlyMap<string, number>;
  readonly elementIndex: ReadonlyMap<string, number>;
  readonly rowCount: number;
  /** The first row of each element; one entry more than elements. */
  readonly rowStart: Int32Array;
  /** The element of each row. */
  readonly elementOf: Int32Array;
  /** First node of each row. */
  readonly first: Int32Array;
  /** Second node of each row. */
  readonly second: Int32Array;
  readonly laws: readonly Law[];
}

/** The index of the reference node. */
export const REFERENCE = 0;

/** Numbers the nodes, elements and ports of a valid list. */
export function toNetwork(list: ElementList): Network {
  const { elements } = list;
  const nodeIndex = new Map<string, number>([[REFERENCE_NODE, REFERENCE]]);
  const elementIndex = new Map<string, number>();
  const rowStart = new Int32Array(elements.length + 1);
  const elementOf: number[] = [];
  const first: number[] = [];
  const second: number[] = [];
  const laws: Law[] = [];
  const indexOf = (node: string): number => {
    const known = nodeIndex.get(node);
    if (known !== undefined) return known;
    nodeIndex.set(node, nodeIndex.size);
    return nodeIndex.size - 1;
  };
  elements.forEach((element, place) => {
    elementIndex.set(element.id, place);
    rowStart[place] = first.length;
    for (const [a, b] of portsOf(element)) {
      elementOf.push(place);
      first.push(indexOf(a));
      second.push(indexOf(b));
    }
    laws.push(...lawsOf(element));
  });
  rowStart[elements.length] = first.length;
  return {
    elements,
    nodeNames: [...nodeIndex.keys()],
    nodeIndex,
    elementIndex,
    rowCount: first.length,
    rowStart,
    elementOf: Int32Array.from(elementOf),
    first: Int32Array.from(first),
    second: Int32Array.from(second),
    laws,
  };
}

/** The row of an element's port; −1 where there is none of the name, or the element has no such port. */
export function rowOf({ elementIndex, rowStart }: Network, id: string, port = 0): number {
  const place = elementIndex.get(id);
  if (place === undefined) return -1;
  const row = (rowStart[place] ?? 0) + port;
  return port >= 0 && Number.isInteger(port) && row < (rowStart[place + 1] ?? 0) ? row : -1;
}

/** The forms of a network's rows, to be evaluated at a frequency. */
export function branchTableOf(network: Network): BranchTable {
  const { laws, rowStart, elementOf } = network;
  return new BranchTable(laws, (row, port) =>
    typeof port === 'number' ? (rowStart[elementOf[row] ?? 0] ?? 0) + port : Math.max(0, rowOf(network, port.element)),
  );
}

/** The element that a row is a port of. */
export function elementAt({ elements, elementOf }: Network, row: number): Element | undefined {
  return elements[elementOf[row] ?? -1];
}
