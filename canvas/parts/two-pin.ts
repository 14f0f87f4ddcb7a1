import type { PinDefinition } from './definition';

/** The pins of a two-pin part, lying: 60 px apart, the first to the left. Positive current enters at the first. */
export function twoPins(first = 'first pin', second = 'second pin'): readonly PinDefinition[] {
  return [
    { name: 'a', label: first, at: { x: -30, y: 0 }, outward: 'left' },
    { name: 'b', label: second, at: { x: 30, y: 0 }, outward: 'right' },
  ];
}

/** The two nodes of a two-pin part. @throws when the caller hands another number: that is a fault of the program. */
export function nodePair(nodes: readonly string[]): readonly [string, string] {
  const [a, b] = nodes;
  if (a === undefined || b === undefined) throw new Error('a two-pin part was given fewer than two nodes');
  return [a, b];
}
