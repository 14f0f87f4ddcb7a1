import type { ElementList } from '../elements/element-list';
import { Engine } from './engine';
import type { Network } from './network';
import type { Phasor } from './network-reading';
import type { Problem } from './problem';
import { exactDerivative } from './sweep-exact-derivatives';
import type { Output, SweepOutput, Transfer } from './sweep-output';

/** A value, or undefined where it is not determined. */
export type Found = { readonly re: number; readonly im: number } | undefined;

const PROBE = 'probe';

/**
 * Reads outputs at one frequency after another as `solve` finds them: for the frequencies at which the compiled form is
 * not to be trusted. Slower, but it pivots, and it tells what stands in the way.
 */
export class ExactSweep {
  private readonly engine: Engine;
  private readonly probes = new Map<string, Engine>();
  private frequency = 0;

  constructor(private readonly list: ElementList) {
    this.engine = new Engine(list);
  }

  get network(): Network {
    return this.engine.network;
  }

  /** Solves at a frequency; answers what stood in the way. */
  solveAt(frequency: number): readonly Problem[] {
    this.frequency = frequency;
    for (const probe of this.probes.values()) probe.solveAt(frequency);
    return this.engine.solveAt(frequency);
  }

  /** Makes ready for an output; to be called for each before `solveAt`. */
  prepare(output: Output): void {
    if (output.kind !== 'transfer' || output.transfer.kind !== 'impedance') return;
    const { one, other } = output.transfer;
    const key = `${one} ${other}`;
    if (!this.probes.has(key)) this.probes.set(key, new Engine(this.probed(one, other)));
  }

  /** The output at the frequency solved last; `asked` is the same by its names. */
  read(output: Output, asked: SweepOutput): Found {
    if (asked.quantity === 'groupDelay' || asked.quantity === 'derivative') {
      return exactDerivative(this.list, asked, this.frequency);
    }
    switch (output.kind) {
      case 'transfer':
        return this.readTransfer(output.transfer);
      case 'power': {
        let [re, im] = [0, 0];
        const { readings } = this.engine;
        for (const row of output.rows) {
          const [dRe, dIm] = [readings.dRe[row] ?? 0, readings.dIm[row] ?? 0];
          const [iRe, iIm] = [readings.iRe[row] ?? 0, readings.iIm[row] ?? 0];
          const voltage = readings.dKnown[row] === 1;
          const current = readings.iKnown[row] === 1;
          // Nothing times something finite: the voltage of what is open, and the current of an ideal connection.
          if ((voltage && dRe === 0 && dIm === 0) || (current && iRe === 0 && iIm === 0)) continue;
          if (!voltage || !current) return undefined;
          re += dRe * iRe + dIm * iIm;
          im += dIm * iRe - dRe * iIm;
        }
        return { re, im };
      }
      case 'groupDelay':
      case 'derivative':
        return undefined;
    }
  }

  private readTransfer(transfer: Transfer): Found {
    switch (transfer.kind) {
      case 'impedance': {
        const probe = this.probes.get(`${transfer.one} ${transfer.other}`);
        const z = probe === undefined ? undefined : readPhasor(probe, { kind: 'between', one: transfer.one, other: transfer.other });
        return transfer.inverse ? divide({ re: 1, im: 0 }, z) : z;
      }
      case 'ratio':
        return divide(readPhasor(this.engine, transfer.of), readPhasor(this.engine, transfer.to));
      default:
        return readPhasor(this.engine, transfer);
    }
  }

  /** The list with its sources dead and one ampere sent into a node and out of another; nodes keep their numbers. */
  private probed(one: number, other: number): ElementList {
    const { nodeNames, elementIndex } = this.network;
    let id = PROBE;
    while (elementIndex.has(id)) id += PROBE;
    const elements = this.list.elements.map((element) =>
      element.kind === 'voltageSource' || element.kind === 'currentSource'
        ? { ...element, value: { rms: 0, phase: 0, frequency: null } }
        : element,
    );
    return {
      version: 1,
      elements: [
        ...elements,
        {
          id,
          kind: 'currentSource',
          nodes: [nodeNames[other] ?? '', nodeNames[one] ?? ''],
          value: { rms: 1, phase: 0, frequency: null },
        },
      ],
    };
  }
}

function readPhasor({ readings }: Engine, phasor: Phasor): Found {
  if (phasor.kind === 'current') {
    const { row } = phasor;
    return readings.iKnown[row] === 1 ? { re: readings.iRe[row] ?? 0, im: readings.iIm[row] ?? 0 } : undefined;
  }
  const { one, other, row } = phasor;
  if (row !== undefined) {
    return readings.dKnown[row] === 1 ? { re: readings.dRe[row] ?? 0, im: readings.dIm[row] ?? 0 } : undefined;
  }
  if (readings.vKnown[one] !== 1 || readings.vKnown[other] !== 1) return undefined;
  return {
    re: (readings.vRe[one] ?? 0) - (readings.vRe[other] ?? 0),
    im: (readings.vIm[one] ?? 0) - (readings.vIm[other] ?? 0),
  };
}

function divide(of: Found, to: Found): Found {
  if (of === undefined || to === undefined) return undefined;
  const square = to.re * to.re + to.im * to.im;
  if (square === 0 || !Number.isFinite(square)) return undefined;
  return { re: (of.re * to.re + of.im * to.im) / square, im: (of.im * to.re - of.re * to.im) / square };
}
