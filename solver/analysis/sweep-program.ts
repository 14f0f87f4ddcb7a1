import type { Law } from '../elements/law';
import type { OutputArrays, Points, Samples } from '../tape/lane-runner';
import { OUTSIDE, runOverPoints, runOverSamples, WEAK } from '../tape/lane-runner';
import { shapeOf } from '../tape/network-inputs';
import type { SweepTape } from '../tape/sweep-tape';
import { compileSweep } from '../tape/sweep-tape';
import type { Level } from '../tape/tape-builder';
import { LEVEL } from '../tape/tape-builder';
import type { Network } from './network';
import type { Output } from './sweep-output';

/** Other orders of elimination that are compiled for points at which the usual one has a weak pivot, and kept. */
const MOST_ALTERNATIVES = 4;
const SAMPLES = 3;

/**
 * Outputs of a network, compiled. A point at which a pivot is weak (the middle of an inductor and a capacitor near their
 * resonance) is done again by a tape in whose order it is not, found at some of these points and kept for the next time.
 */
export class SweepProgram {
  private readonly shape: string;
  private usual: SweepTape | 'none' | undefined;
  private doubts = new Uint8Array(0);
  private readonly alternatives: (SweepTape | 'none')[] = [];

  /** @param levelOf the level of a row's numbers */
  constructor(
    private readonly network: Network,
    private readonly outputs: readonly Output[],
    private readonly levelOf: (row: number) => Level = () => LEVEL.constant,
  ) {
    this.shape = shapeOf(network.laws);
  }

  /** Whether the same program serves other laws of the same network. */
  fits(laws: readonly Law[]): boolean {
    return shapeOf(laws) === this.shape;
  }

  /** Marks for so many places, none of them set; the same array again and again. */
  doubtsFor(count: number): Uint8Array {
    if (this.doubts.length !== count) this.doubts = new Uint8Array(count);
    else this.doubts.fill(0);
    return this.doubts;
  }

  /** Runs over frequencies; marks in `doubtful` the places that are left to the exact engine, and says whether there are any. */
  run(laws: readonly Law[], frequencies: Float64Array, arrays: readonly OutputArrays[], doubtful: Uint8Array): boolean {
    const usual = this.usualFor(laws, frequencies);
    if (usual === 'none') {
      doubtful.fill(OUTSIDE);
      return frequencies.length > 0;
    }
    runOverPoints(usual, laws, { frequencies }, arrays, doubtful);
    if (doubtful.includes(WEAK)) this.runAgain(laws, (place) => frequencies[place] ?? 0, arrays, doubtful);
    return doubtful.includes(WEAK) || doubtful.includes(OUTSIDE);
  }

  /** Runs over frequencies and samples; values and marks stand at frequency·samples + sample. */
  runSamples(
    laws: readonly Law[],
    frequencies: Float64Array,
    samples: Samples,
    arrays: readonly OutputArrays[],
    doubtful: Uint8Array,
  ): void {
    const usual = this.usualFor(laws, frequencies);
    if (usual === 'none') {
      doubtful.fill(OUTSIDE);
      return;
    }
    runOverSamples(usual, laws, frequencies, samples, arrays, doubtful);
    if (!doubtful.includes(WEAK)) return;
    this.runAgain(laws, (at) => frequencies[Math.floor(at / samples.count)] ?? 0, arrays, doubtful, samples);
  }

  private runAgain(
    laws: readonly Law[],
    frequencyAt: (at: number) => number,
    arrays: readonly OutputArrays[],
    doubtful: Uint8Array,
    samples?: Samples,
  ): void {
    for (let attempt = 0; attempt < MOST_ALTERNATIVES; attempt++) {
      const places: number[] = [];
      for (let at = doubtful.indexOf(WEAK); at >= 0; at = doubtful.indexOf(WEAK, at + 1)) places.push(at);
      if (places.length === 0) return;
      const frequencies = Float64Array.from(places, frequencyAt);
      const tape = (this.alternatives[attempt] ??= this.alternativeFor(laws, frequencies));
      if (tape === 'none') return;
      const points: Points = {
        frequencies,
        samples,
        sampleOf: samples === undefined ? undefined : Int32Array.from(places, (at) => at % samples.count),
      };
      const count = places.length;
      const found = arrays.map(() => ({ re: new Float64Array(count), im: new Float64Array(count) }));
      const still = new Uint8Array(count);
      runOverPoints(tape, laws, points, found, still);
      for (const [index, { re, im }] of found.entries()) {
        const array = arrays[index];
        if (array === undefined) continue;
        for (const [place, at] of places.entries()) {
          array.re[at] = re[place] ?? 0;
          array.im[at] = im[place] ?? 0;
        }
      }
      for (const [place, at] of places.entries()) doubtful[at] = still[place] ?? OUTSIDE;
    }
  }

  private usualFor(laws: readonly Law[], frequencies: Float64Array): SweepTape | 'none' {
    if (frequencies.length === 0) return 'none';
    this.usual ??= compileSweep({ ...this.network, laws }, this.outputs, this.levelOf, this.hasEquations ? acrossBand(frequencies) : []) ?? 'none';
    return this.usual;
  }

  private alternativeFor(laws: readonly Law[], frequencies: Float64Array): SweepTape | 'none' {
    const step = Math.max(1, Math.floor((frequencies.length - 1) / (SAMPLES - 1)));
    const samples = [...new Set(Array.from({ length: SAMPLES }, (_, k) => frequencies[Math.min(k * step, frequencies.length - 1)] ?? 0))];
    return compileSweep({ ...this.network, laws }, this.outputs, this.levelOf, samples) ?? 'none';
  }

  private get hasEquations(): boolean {
    return this.network.laws.some(({ law }) => law === 'equation');
  }
}

/** Parts of a band, on a logarithmic scale: off its ends and middle, where a person's network is likely to have a resonance. */
const PARTS = [0.013, 0.237, 0.487, 0.741, 0.981];

function acrossBand(frequencies: Float64Array): number[] {
  let [low, high] = [Infinity, 0];
  for (const frequency of frequencies) {
    if (frequency > 0) low = Math.min(low, frequency);
    high = Math.max(high, frequency);
  }
  if (!(low <= high)) return [];
  return low === high ? [low] : PARTS.map((part) => low * (high / low) ** part);
}
