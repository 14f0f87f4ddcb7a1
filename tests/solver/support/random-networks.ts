import type { Element } from '@/solver';
import { capacitor, currentSource, inductor, resistor, voltageSource } from './networks';
import type { Random } from './random';

export interface Recipe {
  readonly nodes: readonly [number, number];
  /** Impedances at `frequency` from 10^−decades to 10^decades ohms. */
  readonly decades: number;
  readonly frequency: number;
  readonly floatingSource?: boolean;
  readonly currentSource?: boolean;
}

/** A connected network of resistors, inductors and capacitors that a voltage source drives at node 1. */
export function randomElements(random: Random, recipe: Recipe): Element[] {
  const omega = 2 * Math.PI * recipe.frequency;
  const nodes = random.whole(...recipe.nodes);
  const elements: Element[] = [voltageSource('V1', '1', '0', 1, 45 * random.whole(0, 7))];
  const join = (a: number, b: number): void => {
    const id = `Z${elements.length}`;
    const [one, other] = [String(a), String(b)];
    const size = 10 ** random.between(-recipe.decades, recipe.decades);
    const kind = random.whole(0, 2);
    if (kind === 0) elements.push(resistor(id, one, other, size));
    else if (kind === 1) elements.push(inductor(id, one, other, size / omega));
    else elements.push(capacitor(id, one, other, 1 / (size * omega)));
  };
  for (let node = 2; node <= nodes; node++) {
    const other = random.whole(1, node - 1);
    if (recipe.floatingSource === true && node === nodes) {
      elements.push(voltageSource('V2', String(node), String(other), random.between(0.1, 10), random.between(-180, 180)));
    } else join(node, other);
  }
  for (let extra = 0; extra < nodes + 2; extra++) {
    const a = random.whole(0, nodes);
    const b = random.whole(0, nodes);
    join(a, a === b ? (a + 1) % (nodes + 1) : b);
  }
  if (recipe.currentSource === true) {
    const from = String(random.whole(0, nodes - 1));
    elements.push(currentSource('I1', from, String(nodes), 10 ** random.between(-3, 3), random.between(-180, 180)));
  }
  return elements;
}
