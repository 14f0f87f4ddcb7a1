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
