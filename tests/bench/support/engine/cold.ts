import { sweep } from '@/solver';
import { logarithmicFrequencies } from '@/solver/analysis/frequency-grid';
import { ladder } from './networks';

/** The first sweep of a process: prints the milliseconds that it takes, wall. */
const { list, output } = ladder(6);
const frequencies = logarithmicFrequencies(100, 1e5, 401);
const start = performance.now();
const result = sweep(list, { frequencies, outputs: [{ quantity: 'voltage', node: output }] });
const spent = performance.now() - start;
if (!result.ok) throw new Error(result.message);
console.log(spent);
