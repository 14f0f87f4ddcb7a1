import { once } from 'node:events';
import { Worker } from 'node:worker_threads';
import { expect, it } from 'vitest';
import type { ElementList } from '@/solver';
import { solve } from '@/solver';

/** A thread of its own, with nothing but the solver: no page, no globals of this one. */
const THREAD = `
import { parentPort } from 'node:worker_threads';
import { register } from ${JSON.stringify(new URL('../../node_modules/tsx/dist/esm/api/index.mjs', import.meta.url).href)};
register();
const { solve } = await import(${JSON.stringify(new URL('../../solver/index.ts', import.meta.url).href)});
parentPort.once('message', ({ list, frequency, nodes }) => {
  const answer = solve(list, { frequency });
  parentPort.postMessage(nodes.map((node) => { const { re, im } = answer.voltage(node); return [re, im]; }));
});
`;

const list: ElementList = {
  version: 1,
  elements: [
    { id: 'VS1', kind: 'voltageSource', nodes: ['in', '0'], value: { rms: 1, phase: 30, frequency: null } },
    { id: 'R1', kind: 'resistor', nodes: ['in', 'm'], resistance: 1500 },
    { id: 'C1', kind: 'capacitor', nodes: ['m', 'out'], capacitance: 10e-9 },
    { id: 'R2', kind: 'resistor', nodes: ['m', 'out'], resistance: 15_000 },
    { id: 'U1', kind: 'operationalAmplifier', nodes: ['0', 'm', 'out'] },
  ],
};

it('the solver runs unchanged in a thread of its own, and answers the same to the last digit', async () => {
  const worker = new Worker(new URL(`data:text/javascript,${encodeURIComponent(THREAD)}`));
  try {
    worker.postMessage({ list, frequency: 1234, nodes: ['m', 'out'] });
    const [answer] = (await once(worker, 'message')) as [readonly (readonly [number, number])[]];
    const here = solve(list, { frequency: 1234 });
    if (!here.ok) throw new Error(here.message);
    expect(answer).toEqual(['m', 'out'].map((node) => [here.voltage(node)?.re, here.voltage(node)?.im]));
  } finally {
    await worker.terminate();
  }
});
