import type { Network } from '../analysis/network';
import type { Law, Tabulated } from '../elements/law';
import type { NetworkInputs } from './network-inputs';
import type { TapeBuilder, Value } from './tape-builder';
import { negative, NOTHING, ZERO } from './tape-builder';

/** The admittances of a network's rows on a tape, each written down when it is first asked for. */
export class Admittances {
  private readonly builder: TapeBuilder;
  private readonly known = new Map<number, Value>();

  constructor(
    private readonly network: Network,
    private readonly inputs: NetworkInputs,
  ) {
    this.builder = inputs.builder;
  }

  /** The admittance of a row. */
  of(row: number): Value {
    const known = this.known.get(row);
    if (known !== undefined) return known;
    const value = this.write([row]);
    this.known.set(row, value);
    return value;
  }

  /** s·dy/ds of a row: y for a capacitor, −y for an inductor, and for a table what its curve does at the frequency. */
  logarithmicSlope(row: number): Value {
    const { builder } = this;
    switch (this.network.laws[row]?.law) {
      case 'capacitance':
        return this.of(row);
      case 'inductance':
        return negative(this.of(row));
      case 'impedance': {
        const y = this.of(row);
        const slope = this.inputs.functionOf(row, (law) => logarithmicSlopeOf(tableOf(law)));
        return negative(builder.mul(builder.mul(y, y), slope));
      }
      default:
        return ZERO;
    }
  }

  /** The admittance of rows in parallel. */
  sumOf(rows: readonly number[]): Value {
    const [only] = rows;
    return rows.length === 1 && only !== undefined ? this.of(only) : this.write(rows);
  }

  /** G + j(ωC − Γ/ω) of rows in parallel, each kind summed before the frequency comes in; and what comes from tables. */
  private write(rows: readonly number[]): Value {
    const { builder, inputs, network } = this;
    let [conductance, capacitance, inverseInductance] = [NOTHING, NOTHING, NOTHING];
    let rest = ZERO;
    for (const row of rows) {
      switch (network.laws[row]?.law) {
        case 'resistance': {
          const r = inputs.scalar(row, 'R', (law) => (law.law === 'resistance' ? law.resistance : NaN));
          conductance = builder.addParts(conductance, builder.reciprocal({ re: r, im: NOTHING }).re);
          break;
        }
        case 'capacitance': {
          const c = inputs.scalar(row, 'C', (law) => (law.law === 'capacitance' ? law.capacitance : NaN));
          capacitance = builder.addParts(capacitance, c);
          break;
        }
        case 'inductance': {
          const l = inputs.scalar(row, 'L', (law) => (law.law === 'inductance' ? law.inductance : NaN));
          inverseInductance = builder.addParts(inverseInductance, builder.reciprocal({ re: l, im: NOTHING }).re);
          break;
        }
        case 'impedance':
          rest = builder.add(rest, builder.reciprocal(inputs.functionOf(row, tableOf)));
          break;
        default:
          break;
      }
    }
    const im = builder.addDot(NOTHING, inputs.omega, capacitance, -inputs.inverseOmega, inverseInductance);
    return builder.add({ re: conductance, im }, rest);
  }
}

/** |y| of a law at an angular frequency; nothing for one that is no admittance or not known by a number. */
export function sizeOf(law: Law, omega: number): number {
  switch (law.law) {
    case 'resistance':
      return Math.abs(1 / law.resistance);
    case 'capacitance':
      return Math.abs(omega * law.capacitance);
    case 'inductance':
      return Math.abs(1 / (omega * law.inductance));
    default:
      return 0;
  }
}

/** The same in numbers, at a frequency. */
export function admittanceAt(law: Law | undefined, frequency: number): readonly [number, number] {
  const omega = 2 * Math.PI * frequency;
  switch (law?.law) {
    case 'resistance':
      return [1 / law.resistance, 0];
    case 'capacitance':
      return [0, omega * law.capacitance];
    case 'inductance':
      return [0, -1 / (omega * law.inductance)];
    case 'impedance': {
      const [re, im] = law.at(frequency) ?? [1, 0];
      const square = re * re + im * im;
      return [re / square, -im / square];
    }
    default:
      return [0, 0];
  }
}

function tableOf(law: Law): Tabulated | undefined {
  return law.law === 'impedance' ? law.at : undefined;
}

/** A step in ln f that stays within a table's interval, and is far above rounding. */
const STEP = 1e-6;

/** dZ/d(ln f). A table is linear in ln f between its points, so the difference quotient within an interval is exact. */
export function logarithmicSlopeOf(table: Tabulated | undefined): Tabulated | undefined {
  if (table === undefined) return undefined;
  return (frequency) => {
    const here = table(frequency);
    if (here === undefined) return undefined;
    const above = table(frequency * (1 + STEP));
    const there = above ?? table(frequency * (1 - STEP));
    if (there === undefined) return undefined;
    const span = Math.log1p(above === undefined ? -STEP : STEP);
    return [(there[0] - here[0]) / span, (there[1] - here[1]) / span];
  };
}

/** Whether a law is one of a voltage and a current that are proportional, and of nothing else. */
export function isAdmittance(law: Law | undefined): boolean {
  switch (law?.law) {
    case 'resistance':
    case 'capacitance':
    case 'inductance':
    case 'impedance':
      return true;
    default:
      return false;
  }
}

