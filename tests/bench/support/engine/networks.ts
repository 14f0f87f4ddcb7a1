import type { Element, ElementList } from '@/solver';
import { capacitor, inductor, network, resistor, voltageSource } from '../../../solver/support/networks';

/** The networks that are measured: all driven by 1 V between node `in` and the reference. */

export interface Measured {
  readonly list: ElementList;
  /** The node whose voltage is the one output. */
  readonly output: string;
  /** All nodes whose voltage is not known. */
  readonly unknowns: readonly string[];
}

function measured(elements: readonly Element[], output: string): Measured {
  const nodes = new Set(elements.flatMap((element) => element.nodes));
  nodes.delete('0');
  nodes.delete('in');
  return { list: network(voltageSource('V', 'in', '0', 1), ...elements), output, unknowns: [...nodes] };
}

/** Sections of a resistor and an inductor in series and a capacitor across, 2 unknowns each; one more with a source resistor. */
export function ladder(sections: number, { sourceResistor = false } = {}): Measured {
  const elements: Element[] = [];
  let at = 'in';
  if (sourceResistor) {
    elements.push(resistor('Rs', 'in', 'start', 50));
    at = 'start';
  }
  for (let k = 0; k < sections; k++) {
    elements.push(
      resistor(`R${k}`, at, `m${k}`, 10 + (k % 7)),
      inductor(`L${k}`, `m${k}`, `n${k}`, 1e-3 * (1 + (k % 5) / 10)),
      capacitor(`C${k}`, `n${k}`, '0', 1e-7 * (1 + (k % 3) / 10)),
    );
    at = `n${k}`;
  }
  elements.push(resistor('RL', at, '0', 100));
  return measured(elements, at);
}

/** A grid of resistors across, inductors down and capacitors to the reference, and a tail of resistors and capacitors. */
export function mesh(width: number, height: number, tail = 0): Measured {
  const elements: Element[] = [resistor('Rs', 'in', '0_0', 50)];
  for (let x = 0; x < width; x++) {
    for (let y = 0; y < height; y++) {
      const here = `${x}_${y}`;
      if (x + 1 < width) elements.push(resistor(`R${here}`, here, `${x + 1}_${y}`, 10 + ((3 * x + y) % 7)));
      if (y + 1 < height) elements.push(inductor(`L${here}`, here, `${x}_${y + 1}`, 1e-3 * (1 + ((x + y) % 5) / 10)));
      elements.push(capacitor(`C${here}`, here, '0', 1e-7 * (1 + ((x + 2 * y) % 3) / 10)));
    }
  }
  let at = `${width - 1}_${height - 1}`;
  for (let k = 0; k < tail; k++) {
    elements.push(resistor(`T${k}`, at, `t${k}`, 20), capacitor(`U${k}`, `t${k}`, '0', 1e-8));
    at = `t${k}`;
  }
  return measured(elements, at);
}

/** The nodal equations (G + jωC + Γ/(jω))·v = g + jωc + γ/(jω), as triplets: what every peer is given. */
export interface Equations {
  readonly size: number;
  readonly output: number;
  /** Row, column, G, C, Γ; each place once. */
  readonly entries: readonly (readonly [number, number, number, number, number])[];
  /** Row, g, c, γ. */
  readonly right: readonly (readonly [number, number, number, number])[];
}

export function equationsOf({ list, output, unknowns }: Measured): Equations {
  const place = new Map(unknowns.map((node, at) => [node, at]));
  const entries = new Map<string, [number, number, number, number, number]>();
  const right = new Map<number, [number, number, number, number]>();
  const add = (row: number, column: number, values: readonly [number, number, number], sign: number): void => {
    const key = `${row} ${column}`;
    const entry = entries.get(key) ?? [row, column, 0, 0, 0];
    for (const [k, value] of values.entries()) entry[k + 2] = (entry[k + 2] ?? 0) + sign * value;
    entries.set(key, entry);
  };
  for (const element of list.elements) {
    const values = admittanceOf(element);
    if (values === undefined) continue;
    const [one = '', other = ''] = element.nodes;
    for (const [node, far] of [
      [one, other],
      [other, one],
    ] as const) {
      const row = place.get(node);
      if (row === undefined) continue;
      add(row, row, values, 1);
      const column = place.get(far);
      if (column !== undefined) add(row, column, values, -1);
      else if (far === 'in') {
        const entry = right.get(row) ?? [row, 0, 0, 0];
        for (const [k, value] of values.entries()) entry[k + 1] = (entry[k + 1] ?? 0) + value;
        right.set(row, entry);
      }
    }
  }
  return { size: unknowns.length, output: place.get(output) ?? 0, entries: [...entries.values()], right: [...right.values()] };
}

/** G, C and Γ of an element. */
function admittanceOf(element: Element): readonly [number, number, number] | undefined {
  if (element.kind === 'resistor') return [1 / element.resistance, 0, 0];
  if (element.kind === 'capacitor') return [0, element.capacitance, 0];
  return element.kind === 'inductor' ? [0, 0, 1 / element.inductance] : undefined;
}

/** The list with every value a little different: what an edit, or a sample, makes of it. */
export function changed(list: ElementList, factor: number): ElementList {
  const elements = list.elements.map((element): Element => {
    if (element.kind === 'resistor') return { ...element, resistance: factor * element.resistance };
    if (element.kind === 'capacitor') return { ...element, capacitance: factor * element.capacitance };
    return element.kind === 'inductor' ? { ...element, inductance: factor * element.inductance } : element;
  });
  return { version: 1, elements };
}
