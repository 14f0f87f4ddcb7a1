import type { Complex } from 'complex.js';
import type { Element, ElementList } from '../elements/element-list';
import { sameFrequency } from '../elements/source-value';
import { validateElementList } from '../elements/validate-element-list';
import { faultOfFrequency } from './frequency';
import type { Problem } from './problem';
import { problem } from './problem';
import type { Solution } from './solution';
import { solve } from './steady-state';

export interface SuperpositionOptions {
  /** Hertz; what a source without a frequency of its own delivers at. */
  readonly operatingFrequency: number;
  /** The solution at the operating frequency, where it is at hand already. */
  readonly known?: Solution;
}

/** One frequency's share of a quantity. */
export interface Component {
  /** Hertz. */
  readonly frequency: number;
  /** rms phasor on the cosine; at 0 Hz the direct value. */
  readonly phasor: Complex;
}

/** A quantity over all frequencies at once. */
export interface Total {
  /** One for each frequency of the sources, in rising order; the time function is their sum, see `valueAt`. */
  readonly components: readonly Component[];
  /** √(X₀² + Σ|X_f|²), the true rms value (IEC 60050-103-02-03): components of different frequencies do not mix in a mean. */
  readonly rms: number;
}

/**
 * A network under sources of several frequencies: the steady state is the sum of those at each frequency, every other
 * source dead (superposition). A method answers `undefined` where the quantity is not determined at one of them.
 */
export interface Superposition {
  readonly ok: true;
  readonly operatingFrequency: number;
  /** Hertz, rising. */
  readonly frequencies: readonly number[];
  /** One for each frequency. */
  readonly solutions: readonly (Solution | Problem)[];
  voltage(node: string): Total | undefined;
  elementVoltage(id: string, port?: number): Total | undefined;
  current(id: string, port?: number): Total | undefined;
  /**
   * The mean power that an element absorbs, W: the sum of Re V·I* over the frequencies, since a voltage and a current
   * of different frequencies do no work in the mean.
   */
  activePower(id: string): number | undefined;
  /** V·I of the true rms values of an element's first port, VA. */
  apparentPower(id: string): number | undefined;
  /** What stood in the way at each frequency where something did. */
  readonly problems: readonly { readonly frequency: number; readonly problem: Problem }[];
}

/**
 * The frequencies that the sources of a list deliver at, hertz, rising; sources of nothing do not count, and two
 * frequencies that differ by rounding alone are one. Without any source, the operating frequency alone.
 */
export function sourceFrequencies(list: ElementList, operatingFrequency: number): readonly number[] {
  const found: number[] = [];
  for (const element of list.elements) {
    if (element.kind !== 'voltageSource' && element.kind !== 'currentSource') continue;
    if (element.value.rms === 0) continue;
    const own = element.value.frequency ?? operatingFrequency;
    const frequency = sameFrequency(own, operatingFrequency) ? operatingFrequency : own;
    if (!found.some((known) => sameFrequency(known, frequency))) found.push(frequency);
  }
  return found.length === 0 ? [operatingFrequency] : found.sort((a, b) => a - b);
}

/**
 * Solves a network over all the frequencies of its sources at once. A bare `Problem` only for a faulty request; what
 * stands in the way at one frequency is among `problems`, and does no harm at the others. Cost: one `solve` a frequency.
 */
export function superpose(list: ElementList, options: SuperpositionOptions): Superposition | Problem {
  const checked = validateElementList(list);
  if (!checked.ok) return problem('invalid', checked.elements, [], checked.message);
  const { operatingFrequency, known } = options;
  const fault = faultOfFrequency(operatingFrequency);
  if (fault !== undefined) return problem('invalid', [], [], fault);
  const frequencies = sourceFrequencies(checked.list, operatingFrequency);
  const fixed = fixFrequencies(checked.list, operatingFrequency);
  const solutions = frequencies.map((frequency) =>
    known !== undefined && known.frequency === frequency ? known : solve(fixed, { frequency }),
  );
  const total = (read: (solution: Solution) => Complex | undefined): Total | undefined => {
    const components: Component[] = [];
    for (const [place, solution] of solutions.entries()) {
      const phasor = solution.ok ? read(solution) : undefined;
      if (phasor === undefined) return undefined;
      components.push({ frequency: frequencies[place] ?? 0, phasor });
    }
    return { components, rms: Math.hypot(...components.map(({ phasor }) => phasor.abs())) };
  };
  const current = (id: string, port?: number): Total | undefined => total((solution) => solution.current(id, port));
  const elementVoltage = (id: string, port?: number): Total | undefined =>
    total((solution) => solution.elementVoltage(id, port));
  return {
    ok: true,
    operatingFrequency,
    frequencies,
    solutions,
    voltage: (node) => total((solution) => solution.voltage(node)),
    elementVoltage,
    current,
    activePower: (id) => {
      const powers = total((solution) => solution.power(id));
      return powers?.components.reduce((sum, { phasor }) => sum + phasor.re, 0);
    },
    apparentPower: (id) => {
      const voltage = elementVoltage(id);
      const through = current(id);
      return voltage === undefined || through === undefined ? undefined : voltage.rms * through.rms;
    },
    problems: solutions.flatMap((solution, place) => {
      const frequency = frequencies[place] ?? 0;
      return (solution.ok ? solution.problems : [solution]).map((found) => ({ frequency, problem: found }));
    }),
  };
}

/** The value of a quantity at a time in seconds: X₀ + Σ √2·|X_f|·cos(2πft + φ_f). */
export function valueAt({ components }: Total, time: number): number {
  let sum = 0;
  for (const { frequency, phasor } of components) {
    if (frequency === 0) {
      sum += phasor.re;
      continue;
    }
    // Whole periods are taken off first: the angle of a late time would lose its digits in 2π.
    const turns = frequency * time;
    const angle = 2 * Math.PI * (turns - Math.floor(turns));
    sum += Math.SQRT2 * (phasor.re * Math.cos(angle) - phasor.im * Math.sin(angle));
  }
  return sum;
}

/** A source without a frequency of its own delivers at whichever is solved; here it must not at the others' ones. */
function fixFrequencies(list: ElementList, operatingFrequency: number): ElementList {
  const elements = list.elements.map((element): Element => {
    switch (element.kind) {
      case 'voltageSource':
      case 'currentSource':
        return { ...element, value: { ...element.value, frequency: element.value.frequency ?? operatingFrequency } };
      default:
        return element;
    }
  });
  return { ...list, elements };
}
