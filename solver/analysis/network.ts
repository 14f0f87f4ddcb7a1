import type { Element, ElementList } from '../elements/element-list';
import { REFERENCE_NODE } from '../elements/element-list';

/** An element list by numbers: nodes and elements as indices, the reference node first whether it is used or not. */
export interface Network {
  readonly elements: readonly Element[];
  readonly nodeNames: readonly string[];
  readonly nodeIndex: ReadonlyMap<string, number>;
  readonly elementIndex: ReadonlyMap<string, number>;
  /** First node of each element. */
  readonly first: Int32Array;
  /** Second node of each element. */
  readonly second: Int32Array;
}

/** The index of the reference node. */
export const REFERENCE = 0;

/** Numbers the nodes and elements of a valid list. */
export function toNetwork(list: ElementList): Network {
  const { elements } = list;
  const nodeIndex = new Map<string, number>([[REFERENCE_NODE, REFERENCE]]);
  const elementIndex = new Map<string, number>();
  const first = new Int32Array(elements.length);
  const second = new Int32Array(elements.length);
  const indexOf = (node: string): number => {
    const known = nodeIndex.get(node);
    if (known !== undefined) return known;
    nodeIndex.set(node, nodeIndex.size);
    return nodeIndex.size - 1;
  };
  elements.forEach((element, row) => {
    elementIndex.set(element.id, row);
    first[row] = indexOf(element.nodes[0]);
    second[row] = indexOf(element.nodes[1]);
  });
  return { elements, nodeNames: [...nodeIndex.keys()], nodeIndex, elementIndex, first, second };
}
