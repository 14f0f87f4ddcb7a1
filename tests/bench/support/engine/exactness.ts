import { sweep } from '@/solver';
import { solveExactly } from '../../../reference/support/exact-solver';
import { network } from '../../../solver/support/networks';
import { Random } from '../../../solver/support/random';
import { randomElements } from '../../../solver/support/random-networks';

const FREQUENCY = 1000;
const CASES = 300;
const ZERO = 1e-40;

/** The largest error of a node voltage over random networks of 24 decades, in units of ε·(1 + condition), against 64 digits. */
export function worstError(): number {
  let worst = 0;
  for (let seed = 5001; seed < 5001 + CASES; seed++) {
    const elements = randomElements(new Random(seed), { nodes: [3, 7], decades: 12, frequency: FREQUENCY });
    const list = network(...elements);
    const exact = solveExactly(list, FREQUENCY);
    const nodes = [...new Set(elements.flatMap((element) => element.nodes))].filter((node) => node !== '0');
    const result = sweep(list, {
      frequencies: [FREQUENCY],
      outputs: nodes.map((node) => ({ quantity: 'voltage', node })),
    });
    if (!result.ok) throw new Error(result.message);
    for (const [place, node] of nodes.entries()) {
      const trace = result.traces[place];
      const right = exact.voltage(node);
      if (trace === undefined || Math.hypot(right.re, right.im) < ZERO) continue;
      const error = right.errorOf({ re: trace.re[0] ?? NaN, im: trace.im[0] ?? NaN });
      worst = Math.max(worst, error / (Number.EPSILON * (1 + right.condition)));
    }
  }
  return worst;
}
