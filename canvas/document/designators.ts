import { definitionOf, type PartKind } from '../parts/registry';

/** The first free designator of a kind: its letters and the lowest number not in use. Empty for kinds without one. */
export function freeDesignator(kind: PartKind, taken: ReadonlySet<string>): string {
  const { letters } = definitionOf(kind);
  if (letters === '') return '';
  let number = 1;
  while (taken.has(`${letters}${number}`)) number += 1;
  return `${letters}${number}`;
}

/** Letters, digits and a few joining marks: what can stand in a sentence and in a file name. */
export const DESIGNATOR = /^[\p{L}][\p{L}\p{N}_.+-]{0,15}$/u;

/** Names of nodes: as designators, and numbers too; `0` is the reference node's own. */
export const NODE_NAME = /^[\p{L}\p{N}_+-][\p{L}\p{N}_.+-]{0,15}$/u;

/** Whether a node can be given this name. */
export function isNodeName(name: string): boolean {
  return name !== '0' && NODE_NAME.test(name);
}

/** The first free node name: the wanted one, or it with the lowest number from 2. Equal names are one node. */
export function freeNodeName(wanted: string, taken: ReadonlySet<string>): string {
  let name = wanted;
  for (let number = 2; taken.has(name); number += 1) name = `${wanted}${number}`;
  return name;
}
