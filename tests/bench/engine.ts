import { execFileSync } from 'node:child_process';
import path from 'node:path';
import type { SweepOutput } from '@/solver';
import { solve } from '@/solver';
import { logarithmicFrequencies } from '@/solver/analysis/frequency-grid';
import type { PreparedSweep, Sweep } from '@/solver/analysis/sweep';
import { prepareSweep } from '@/solver/analysis/sweep';
import type { SampledSweep } from '@/solver/analysis/sweep-samples';
import { sweepSamples } from '@/solver/analysis/sweep-samples';
import { tapeMachine } from '@/solver/tape/tape-machine';
import { compare, runner } from './support/engine/clock';
import type { Runner } from './support/engine/clock';
import { worstError } from './support/engine/exactness';
import type { Measured } from './support/engine/networks';
import { changed, equationsOf, ladder, mesh } from './support/engine/networks';
import type { NumericPeer } from './support/engine/numeric-peer';
import { numericPeer } from './support/engine/numeric-peer';
import { byComplexObjects, byMathjs, byRealEmbedding } from './support/engine/peers';
import { median, print } from './support/figures';

/*
 * The engine against what else the same work could be done with, on one thread, in processor time; medians of seven
 * rounds, in each of which all are measured in turn. `vs…` is the peer's time over ours.
 *
 * sweep401.n12.*        401 frequencies, 12 unknowns, a ladder; one output, or all voltages
 * sweep401.grid12.*     the same on a grid of 4 by 3
 * samples10000x101.n12  10,000 samples of the element values at 101 frequencies
 * ladder2003, mesh1772  one frequency's share of a sweep, one output, against splu with the best of four orderings
 * ladder.exponent       growth of a sweep's time from 10 to 1000 sections
 * derivatives10         one output with its derivatives by ten values, over the output alone
 * rlc24decades          see support/engine/exactness
 * cold401               first sweep in a fresh process, wall
 * edit.n….us            new values and one frequency, of a network that is analysed; `solve` the same from nothing
 * point.n….us           one frequency's share of a sweep of 401; by the peers too
 */
const FREQUENCIES = logarithmicFrequencies(100, 1e5, 401);
const COLD_STARTS = 5;
const AREA = 'engine';

const figure = (name: string, value: number, unit = ''): void => print(AREA, name, value, unit);

function prepared(of: Measured, outputs: readonly SweepOutput[]): PreparedSweep {
  const made = prepareSweep(of.list, outputs);
  if (!made.ok) throw new Error(made.message);
  return made;
}

const voltage = (node: string): SweepOutput => ({ quantity: 'voltage', node });

function sweeping(of: Measured, outputs: readonly SweepOutput[], frequencies = FREQUENCIES): Runner {
  const made = prepared(of, outputs);
  // Every peer writes into arrays that were made beforehand.
  let reuse: Sweep | undefined;
  return runner(() => {
    const result = made.run(frequencies, { reuse });
    if (!result.ok) throw new Error(result.message);
    reuse = result;
  });
}

function firstOf(of: Measured, frequencies: Float64Array): number {
  const result = prepared(of, [voltage(of.output)]).run(frequencies.subarray(0, 1));
  if (!result.ok) throw new Error(result.message);
  const [trace] = result.traces;
  return Math.hypot(trace?.re[0] ?? NaN, trace?.im[0] ?? NaN);
}

/** Both have to have done the same work. */
function agree(ours: number, theirs: number, what: string): void {
  if (!(Math.abs(ours - theirs) <= 1e-6 * Math.abs(ours))) throw new Error(`${what}: ${ours} here, ${theirs} there`);
}

async function asking(peer: NumericPeer, of: Measured, request: object, expected: number): Promise<Runner> {
  await peer.load(equationsOf(of));
  return async (times) => {
    const { ms, check } = await peer.run({ ...request, times });
    agree(expected, check, 'numpy or scipy');
    return ms;
  };
}

async function measureSweeps(peer: NumericPeer | undefined): Promise<void> {
  for (const [name, of] of [
    ['n12', ladder(6)],
    ['grid12', mesh(4, 3)],
  ] as const) {
    const frequencies = [...FREQUENCIES];
    const equations = equationsOf(of);
    const objects: Runner = runner(() => {
      for (const frequency of FREQUENCIES) byComplexObjects(equations, frequency);
    });
    const expected = firstOf(of, FREQUENCIES);
    agree(expected, byComplexObjects(equations, FREQUENCIES[0] ?? 0), 'complex.js');
    const runners: Record<string, Runner> = {
      one: sweeping(of, [voltage(of.output)]),
      all: sweeping(of, of.unknowns.map(voltage)),
      objects,
    };
    if (peer !== undefined) runners['numpy'] = await asking(peer, of, { do: 'batched', frequencies }, expected);
    const { one = NaN, all = NaN, objects: byObjects = NaN, numpy } = await compare(runners);
    figure(`sweep401.${name}.one.ms`, one, 'ms');
    figure(`sweep401.${name}.all.ms`, all, 'ms');
    figure(`sweep401.${name}.one.vsComplexJs`, byObjects / one);
    if (numpy === undefined) continue;
    figure(`sweep401.${name}.one.vsNumpy`, numpy / one);
    figure(`sweep401.${name}.all.vsNumpy`, numpy / all);
  }
}

async function measureSamples(peer: NumericPeer | undefined): Promise<void> {
  const of = ladder(6);
  const count = 10_000;
  const frequencies = logarithmicFrequencies(100, 1e5, 101);
  const values: Record<string, Float64Array> = {};
  for (const element of of.list.elements) {
    const value =
      element.kind === 'resistor'
        ? element.resistance
        : element.kind === 'capacitor'
          ? element.capacitance
          : element.kind === 'inductor'
            ? element.inductance
            : undefined;
    if (value !== undefined) values[element.id] = Float64Array.from({ length: count }, (_, k) => value * (0.95 + (0.1 * ((k * 7919) % count)) / count));
  }
  let reuse: SampledSweep | undefined;
  const ours = runner(() => {
    const result = sweepSamples(of.list, { frequencies, outputs: [voltage(of.output)], values, reuse });
    if (!result.ok) throw new Error(result.message);
    reuse = result;
  });
  if (peer === undefined) {
    figure('samples10000x101.n12.ms', (await compare({ ours })).ours, 'ms');
    return;
  }
  await peer.load(equationsOf(of));
  const request = { do: 'samples', count, frequencies: [...frequencies] };
  // The chunk that suits the peer's cache best.
  const chunks = [100, 500, 2000];
  const tried = [];
  for (const chunk of chunks) tried.push((await peer.run({ ...request, chunk })).ms);
  const chunk = chunks[tried.indexOf(Math.min(...tried))];
  const numpy: Runner = async (times) => {
    let spent = 0;
    for (let time = 0; time < times; time++) spent += (await peer.run({ ...request, chunk })).ms;
    return spent;
  };
  const spent = await compare({ ours, numpy });
  figure('samples10000x101.n12.ms', spent.ours, 'ms');
  figure('samples10000x101.n12.vsNumpy', spent.numpy / spent.ours);
}

async function measureLarge(peer: NumericPeer | undefined): Promise<void> {
  for (const [name, of] of [
    ['ladder2003', ladder(1001, { sourceResistor: true })],
    ['mesh1772', mesh(42, 42, 8)],
  ] as const) {
    if (!name.endsWith(String(of.unknowns.length))) throw new Error(`${name} has ${of.unknowns.length} unknowns`);
    const runners: Record<string, Runner> = {
      one: sweeping(of, [voltage(of.output)]),
      all: sweeping(of, of.unknowns.map(voltage)),
    };
    const first = firstOf(of, FREQUENCIES);
    const request = { do: 'sparse', frequencies: [FREQUENCIES[0]] };
    if (peer !== undefined) runners['splu'] = await asking(peer, of, request, first);
    const { one = NaN, all = NaN, splu } = await compare(runners);
    const [share, shareOfAll] = [one / FREQUENCIES.length, all / FREQUENCIES.length];
    figure(`${name}.us`, 1000 * share, 'µs');
    figure(`${name}.all.us`, 1000 * shareOfAll, 'µs');
    if (splu === undefined) continue;
    figure(`${name}.vsSplu`, splu / share);
    figure(`${name}.all.vsSplu`, splu / shareOfAll);
  }
}

async function measureGrowth(): Promise<void> {
  const sections = [10, 30, 100, 300, 1000];
  const runners = Object.fromEntries(
    sections.map((count) => {
      const of = ladder(count);
      return [String(count), sweeping(of, [voltage(of.output)])];
    }),
  );
  const spent = await compare(runners);
  const points = sections.map((count) => [Math.log(count), Math.log(spent[String(count)] ?? NaN)] as const);
  const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
  const [x, y] = [mean(points.map(([at]) => at)), mean(points.map(([, value]) => value))];
  const slope =
    points.reduce((sum, [at, value]) => sum + (at - x) * (value - y), 0) / points.reduce((sum, [at]) => sum + (at - x) ** 2, 0);
  figure('ladder.exponent', slope);
}

async function measureDerivatives(): Promise<void> {
  const of = ladder(6);
  const one = voltage(of.output);
  const ten = of.list.elements.filter(({ kind }) => kind !== 'voltageSource').slice(0, 10);
  const derivatives = ten.map(({ id }): SweepOutput => ({ quantity: 'derivative', of: { quantity: 'voltage', node: of.output }, element: id }));
  const delay: SweepOutput = { quantity: 'groupDelay', of: { quantity: 'voltage', node: of.output } };
  const spent = await compare({
    one: sweeping(of, [one]),
    derivatives: sweeping(of, [one, ...derivatives]),
    delay: sweeping(of, [one, delay]),
  });
  figure('derivatives10.costOverOne', spent.derivatives / spent.one);
  figure('groupDelay.costOverOne', spent.delay / spent.one);
}

function measureCold(): void {
  const script = path.join(import.meta.dirname, 'support/engine/cold.ts');
  const starts = Array.from({ length: COLD_STARTS }, () =>
    Number(execFileSync(process.execPath, ['--import', 'tsx', script], { encoding: 'utf8' })),
  );
  figure('cold401.n12.ms', median(starts), 'ms');
}

/** Peers whose work grows with the cube take this many unknowns at most. */
const MOST_FOR_PEERS = 200;
const MOST_FOR_MATHJS = 60;

async function measureTable(): Promise<void> {
  const frequency = 1000;
  for (const unknowns of [12, 60, 200, 1000]) {
    const of = ladder(unknowns / 2);
    const made = prepared(of, [voltage(of.output)]);
    const lists = [0.9, 1.1].map((factor) => changed(of.list, factor));
    let turn = 0;
    const equations = equationsOf(of);
    const runners: Record<string, Runner> = {
      edit: runner(() => {
        turn = 1 - turn;
        const result = made.run([frequency], { list: lists[turn] });
        if (!result.ok) throw new Error(result.message);
      }),
      solve: runner(() => {
        turn = 1 - turn;
        const result = solve(lists[turn] ?? of.list, { frequency });
        if (!result.ok) throw new Error(result.message);
      }),
      sweep: sweeping(of, [voltage(of.output)]),
    };
    if (unknowns <= MOST_FOR_PEERS) {
      runners['complexJs'] = runner(() => void byComplexObjects(equations, frequency));
      runners['mlMatrix'] = runner(() => void byRealEmbedding(equations, frequency));
    }
    if (unknowns <= MOST_FOR_MATHJS) runners['mathjs'] = runner(() => void byMathjs(equations, frequency));
    const spent = await compare(runners);
    figure(`edit.n${unknowns}.us`, 1000 * (spent['edit'] ?? NaN), 'µs');
    figure(`solve.n${unknowns}.us`, 1000 * (spent['solve'] ?? NaN), 'µs');
    figure(`point.n${unknowns}.us`, (1000 * (spent['sweep'] ?? NaN)) / FREQUENCIES.length, 'µs');
    for (const peer of ['complexJs', 'mlMatrix', 'mathjs']) {
      const ms = spent[peer];
      if (ms !== undefined) figure(`point.n${unknowns}.${peer}.us`, 1000 * ms, 'µs');
    }
  }
}

const peer = await numericPeer();
console.log(peer === undefined ? 'No python3 here has numpy and scipy; their figures are left out.' : `Measured against ${peer.versions}.`);
if (!tapeMachine().isVector) console.log('WebAssembly with SIMD is not to be had here; the plain kernels are measured.');
measureCold();
await measureSweeps(peer);
await measureSamples(peer);
await measureLarge(peer);
await measureGrowth();
await measureDerivatives();
await measureTable();
figure('rlc24decades.worstOverEpsCond', worstError());
peer?.close();
