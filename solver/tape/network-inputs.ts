import { phasorIm, phasorRe } from '../elements/source-value';
import type { Law, Tabulated } from '../elements/law';
import type { Level, Part, TapeBuilder, Value } from './tape-builder';
import { LEVEL, NOTHING } from './tape-builder';

/** A number of an element, constant over the frequencies. */
export interface ScalarInput {
  readonly part: Part;
  readonly row: number;
  readonly read: (law: Law) => number;
}

/** A function of the frequency, of an element. */
export interface FunctionInput {
  readonly value: Value;
  readonly row: number;
  readonly read: (law: Law) => Tabulated | undefined;
}

/**
 * What a network's tape takes in: the angular frequency of each lane, and what the laws of its rows say, each asked for
 * where it is first needed. The laws themselves are read anew at each run, so values may change between runs; whatever
 * decides the shape of the tape is part of `shapeOf`.
 */
export class NetworkInputs {
  readonly scalars: ScalarInput[] = [];
  readonly functions: FunctionInput[] = [];
  /** Angular frequency, rad/s. */
  readonly omega: Part;
  readonly inverseOmega: Part;
  private readonly known = new Map<string, Part>();

  /** @param levelOf the level of a row's numbers */
  constructor(
    readonly builder: TapeBuilder,
    private readonly laws: readonly Law[],
    private readonly levelOf: (row: number) => Level,
  ) {
    this.omega = builder.input(LEVEL.varying);
    this.inverseOmega = builder.reciprocal({ re: this.omega, im: NOTHING }).re;
  }

  /** A number of a row's law, under a name of its own within the row. */
  scalar(row: number, name: string, read: (law: Law) => number): Part {
    const key = `${row} ${name}`;
    const known = this.known.get(key);
    if (known !== undefined) return known;
    const part = this.builder.input(this.levelOf(row));
    this.known.set(key, part);
    this.scalars.push({ part, row, read });
    return part;
  }

  /** A function of the frequency of a row's law. */
  functionOf(row: number, read: (law: Law) => Tabulated | undefined): Value {
    const value = { re: this.builder.input(LEVEL.varying), im: this.builder.input(LEVEL.varying) };
    this.functions.push({ value, row, read });
    return value;
  }

  /** The phasor of a source; the part that is zero has none. */
  phasor(row: number): Value {
    const law = this.laws[row];
    const { re, im } = phasorOf(law);
    return {
      re: re === 0 ? NOTHING : this.scalar(row, 're', (of) => phasorOf(of).re),
      im: im === 0 ? NOTHING : this.scalar(row, 'im', (of) => phasorOf(of).im),
    };
  }
}

/** The phasor of a source that delivers at the operating frequency; nothing of one with a frequency of its own. */
export function phasorOf(law: Law | undefined): { readonly re: number; readonly im: number } {
  if (law === undefined || (law.law !== 'voltage' && law.law !== 'current')) return { re: 0, im: 0 };
  if (law.value.frequency !== null) return { re: 0, im: 0 };
  return { re: phasorRe(law.value), im: phasorIm(law.value) };
}

/** A text that is the same for two rows of laws when the same tape serves both. */
export function shapeOf(laws: readonly Law[]): string {
  return laws
    .map((law) => {
      const { re, im } = phasorOf(law);
      const parts = `${re === 0 ? '' : 'r'}${im === 0 ? '' : 'i'}`;
      if (law.law === 'voltage' || law.law === 'current') return law.law[0] + parts;
      if (law.law !== 'equation') return law.law.slice(0, 3);
      const terms = law.terms.map(({ coefficient }) => {
        if ('at' in coefficient) return 'f';
        return `${coefficient.constant === 0 ? '' : 'c'}${coefficient.slope === 0 ? '' : 's'}`;
      });
      return `e(${terms.join()})`;
    })
    .join(' ');
}
