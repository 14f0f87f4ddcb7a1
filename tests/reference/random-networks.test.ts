import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { solve } from '@/solver';
import { solved } from '../solver/support/expect';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import { Random } from '../solver/support/random';
import { solveExactly } from './support/exact-solver';

/**
 * Random networks against an independent dense solution with 64-digit numbers (mathjs), from the exact element values
 * [computed]. An error is measured in units of ε·(1 + condition), the condition being Σ|p/H·∂H/∂p| over all values.
 */
interface Recipe {
  readonly seeds: readonly [number, number];
  /** Impedances from 10^−decades to 10^decades ohms. */
  readonly decades: number;
  readonly floatingSource: boolean;
  readonly currentSource: boolean;
  /** An inductor and a capacitor in series that cancel but for this part of them, so that the node between has no pivot. */
  readonly trap?: { readonly detuning: number };
}

const FREQUENCY = 1000;
const OMEGA = 2 * Math.PI * FREQUENCY;

function build(random: Random, recipe: Recipe): Element[] {
  const nodes = random.whole(3, 7);
  const elements: Element[] = [voltageSource('V1', '1', '0', 1, 45 * random.whole(0, 7))];
  const join = (a: number, b: number): void => {
    const id = `Z${elements.length}`;
    const [one, other] = [String(a), String(b)];
    const size = 10 ** random.between(-recipe.decades, recipe.decades);
    const kind = random.whole(0, 2);
    if (kind === 0) elements.push(resistor(id, one, other, size));
    else if (kind === 1) elements.push(inductor(id, one, other, size / OMEGA));
    else elements.push(capacitor(id, one, other, 1 / (size * OMEGA)));
  };
  for (let node = 2; node <= nodes; node++) {
    const other = random.whole(1, node - 1);
    if (recipe.floatingSource && node === nodes) {
      elements.push(
        voltageSource('V2', String(node), String(other), random.between(0.1, 10), random.between(-180, 180)),
      );
    } else join(node, other);
  }
  for (let extra = 0; extra < nodes + 2; extra++) {
    const a = random.whole(0, nodes);
    const b = random.whole(0, nodes);
    join(a, a === b ? (a + 1) % (nodes + 1) : b);
  }
  if (recipe.currentSource) {
    elements.push(
      currentSource(
        'I1',
        String(random.whole(0, nodes - 1)),
        String(nodes),
        10 ** random.between(-3, 3),
        random.between(-180, 180),
      ),
    );
  }
  if (recipe.trap !== undefined) {
    const reactance = 10 ** random.between(-recipe.decades, recipe.decades);
    const [a, b] = [random.whole(1, nodes - 1), nodes];
    elements.push(
      inductor('Lt', String(a), 't', reactance / OMEGA),
      capacitor('Ct', 't', String(b), (1 + recipe.trap.detuning) / (reactance * OMEGA)),
    );
  }
  return elements;
}

/** A quantity below this is zero but for the rounding of the 64 digits. */
const NOTHING = 1e-40;

/** The largest errors of node voltages and of element currents, in units of ε·(1 + condition). */
function worstErrors(recipe: Recipe): { voltage: number; current: number; compared: number } {
  const worst = { voltage: 0, current: 0, compared: 0 };
  for (let seed = recipe.seeds[0]; seed <= recipe.seeds[1]; seed++) {
    const elements = build(new Random(seed), recipe);
    const list = network(...elements);
    const solution = solved(solve(list, { frequency: FREQUENCY }));
    expect(solution.problems, `seed ${seed}`).toEqual([]);
    const exact = solveExactly(list, FREQUENCY);
    for (const node of new Set(elements.flatMap((element) => element.nodes))) {
      if (node === '0') continue;
      const output = exact.voltage(node);
      const value = solution.voltage(node);
      if (value === undefined) throw new Error(`seed ${seed}: no voltage of node ${node}`);
      if (Math.hypot(output.re, output.im) < NOTHING) continue;
      worst.voltage = Math.max(worst.voltage, output.errorOf(value) / (Number.EPSILON * (1 + output.condition)));
      worst.compared += 1;
    }
    for (const { id } of elements) {
      const output = exact.current(id);
      const value = solution.current(id);
      if (value === undefined) throw new Error(`seed ${seed}: no current of ${id}`);
      if (Math.hypot(output.re, output.im) < NOTHING) continue;
      worst.current = Math.max(worst.current, output.errorOf(value) / (Number.EPSILON * (1 + output.condition)));
      worst.compared += 1;
    }
  }
  return worst;
}

const PATIENCE = 300_000;

describe('random networks against 64 digits', () => {
  it(
    'has node voltages right to 10·ε·(1 + condition) over 24 decades of impedance',
    () => {
      const worst = worstErrors({ seeds: [1, 110], decades: 12, floatingSource: false, currentSource: false });
      expect(worst.compared).toBeGreaterThan(1000);
      expect(worst.voltage).toBeLessThanOrEqual(10);
    },
    PATIENCE,
  );

  it(
    'has element currents right to 10·ε·(1 + condition) too, over 6 decades',
    () => {
      const worst = worstErrors({ seeds: [201, 260], decades: 3, floatingSource: false, currentSource: false });
      expect(worst.voltage).toBeLessThanOrEqual(10);
      expect(worst.current).toBeLessThanOrEqual(10);
    },
    PATIENCE,
  );

  it(
    'has both right to 50·ε·(1 + condition) with a floating source and a current source, over 4 decades',
    () => {
      const worst = worstErrors({ seeds: [301, 340], decades: 2, floatingSource: true, currentSource: true });
      expect(worst.voltage).toBeLessThanOrEqual(50);
      expect(worst.current).toBeLessThanOrEqual(50);
    },
    PATIENCE,
  );

  it.each([0, 1e-12, 1e-9, 1e-6])(
    'has both right to 20·ε·(1 + condition) where a node’s admittances cancel but for a part of %d',
    (detuning) => {
      const recipe = { decades: 2, floatingSource: false, currentSource: false, trap: { detuning } };
      const worst = worstErrors({ ...recipe, seeds: [401, 410] });
      expect(worst.voltage).toBeLessThanOrEqual(20);
      expect(worst.current).toBeLessThanOrEqual(20);
    },
    PATIENCE,
  );
});
