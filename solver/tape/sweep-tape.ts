import type { Network } from '../analysis/network';
import type { Phasor } from '../analysis/network-reading';
import type { Output, Transfer } from '../analysis/sweep-output';
import type { Law } from '../elements/law';
import { isAdmittance } from './admittances';
import { NetworkInputs } from './network-inputs';
import { LinkedTape } from './linked-tape';
import type { AdjointReadings, Drive, DriveReadings, NetworkTape, Probe } from './network-tape';
import { NodalTape } from './nodal-tape';
import type { Level, Part, Value } from './tape-builder';
import { conjugate, isZero, negative, NOTHING, TapeBuilder, timesJ, ZERO } from './tape-builder';
import type { TapeProgram } from './tape-program';
import { compileTape } from './tape-program';

/** A network and what is asked of it, compiled. */
export interface SweepTape {
  readonly program: TapeProgram;
  readonly inputs: NetworkInputs;
  /** The value of each output. */
  readonly values: readonly Value[];
}

/** Above so many outputs, which is most of the network, nodes are not kept for last. */
const MOST_LAST = 6;

/**
 * Compiles outputs of a network; undefined where its form is one that only the exact engine can do.
 *
 * @param levelOf the level of a row's numbers: constant, or different from lane to lane
 * @param samples frequencies, hertz, at which no pivot may be weak; none for the usual order. A network with equations has
 *   none, and needs some
 */
export function compileSweep(
  network: Network,
  outputs: readonly Output[],
  levelOf: (row: number) => Level,
  samples: readonly number[] = [],
): SweepTape | undefined {
  const builder = new TapeBuilder();
  const inputs = new NetworkInputs(builder, network.laws, levelOf);
  const last = new Set(outputs.flatMap((output) => nodesOf(network, output)));
  const probed = outputs.flatMap((output) => probesOf(network, output));
  const wishes = { last: last.size > MOST_LAST ? [] : [...last], probed, samples };
  const tape = hasEquations(network) ? LinkedTape.of(network, inputs, wishes) : NodalTape.of(network, inputs, wishes);
  if (tape === undefined) return undefined;
  const values = new SweepWriter(network, inputs, tape).write(outputs);
  const program = compileTape(
    builder,
    values.flatMap(({ re, im }) => [re, im]),
  );
  return { program, inputs, values };
}

function ends({ first, second }: Network, row: number): readonly [number, number] {
  return [first[row] ?? 0, second[row] ?? 0];
}

function phasorsOf(output: Output): readonly Phasor[] {
  switch (output.kind) {
    case 'power':
      return output.rows.map((row) => ({ kind: 'current', row }));
    case 'transfer':
      return phasorsOfTransfer(output.transfer);
    case 'groupDelay':
    case 'derivative':
      return phasorsOfTransfer(output.of);
  }
}

function phasorsOfTransfer(transfer: Transfer): readonly Phasor[] {
  switch (transfer.kind) {
    case 'impedance':
      return [{ kind: 'between', one: transfer.one, other: transfer.other }];
    case 'ratio':
      return [transfer.of, transfer.to];
    default:
      return [transfer];
  }
}

function nodesOf(network: Network, output: Output): readonly number[] {
  return phasorsOf(output).flatMap((phasor) =>
    phasor.kind === 'between' ? [phasor.one, phasor.other] : ends(network, phasor.row),
  );
}

/** Pairs of nodes that a current from outside will be put to. */
function probesOf(network: Network, output: Output): readonly (readonly [number, number])[] {
  const isProbed =
    output.kind === 'groupDelay' ||
    output.kind === 'derivative' ||
    (output.kind === 'transfer' && output.transfer.kind === 'impedance');
  if (!isProbed) return [];
  return phasorsOf(output).flatMap((phasor) => (phasor.kind === 'between' ? [[phasor.one, phasor.other] as const] : []));
}

/** A transfer on the tape, and by what currents from outside its derivatives are found. */
interface Written {
  readonly value: Value;
  readonly readings: DriveReadings;
}

interface Gradient {
  /** The adjoint's sources. */
  readonly probes: Probe[];
  readonly currents: Map<number, Value>;
  /** What a row's own admittance in the output adds to the derivative by it: this times the row's voltage. */
  readonly direct: Map<number, Value>;
}

/** The derivatives of an output by the admittances of rows, and s·∂H/∂s by what else stands beside s. */
interface Derivatives {
  readonly byRow: ReadonlyMap<number, Value>;
  readonly slope: Value;
}

/**
 * Writes outputs on a tape. Derivatives are by the adjoint (Director and Rohrer, IEEE Trans. CT-16 (1969) 318): for an
 * output that is linear in voltages, ∂X/∂y = −d·d̂, d being a row's voltage and d̂ that of the same network, its own
 * sources dead, with the output's weights as currents from outside. One more right-hand side gives all derivatives.
 */
class SweepWriter {
  private readonly drives = new Map<string, DriveReadings>();

  constructor(
    private readonly network: Network,
    private readonly inputs: NetworkInputs,
    private readonly tape: NetworkTape,
  ) {}

  write(outputs: readonly Output[]): Value[] {
    const differentiated = new Map<string, { transfer: Transfer; rows: Set<number> }>();
    for (const output of outputs) {
      if (output.kind === 'power') {
        const readings = this.readingsOf('sources');
        for (const row of output.rows) {
          readings.wantVoltage(...ends(this.network, row));
          readings.wantCurrent(row);
        }
        continue;
      }
      const transfer = output.kind === 'transfer' ? output.transfer : output.of;
      this.want(transfer);
      if (output.kind === 'transfer') continue;
      const key = JSON.stringify(transfer);
      const known = differentiated.get(key) ?? { transfer, rows: new Set() };
      differentiated.set(key, known);
      for (const row of this.rowsOf(output)) known.rows.add(row);
      for (const row of known.rows) this.driveOf(transfer).wantVoltage(...ends(this.network, row));
    }
    for (const readings of this.drives.values()) readings.solve();
    const derivatives = new Map(
      Array.from(differentiated, ([key, { transfer, rows }]) => [key, this.differentiate(transfer, [...rows])]),
    );
    return outputs.map((output) => {
      switch (output.kind) {
        case 'power':
          return this.power(output.rows);
        case 'transfer':
          return this.written(output.transfer).value;
        case 'groupDelay':
          return this.groupDelay(output.of, derivatives.get(JSON.stringify(output.of)));
        case 'derivative':
          return this.byValue(output.row, derivatives.get(JSON.stringify(output.of))?.byRow.get(output.row) ?? ZERO);
      }
    });
  }

  private get builder(): TapeBuilder {
    return this.inputs.builder;
  }

  private driveOf(transfer: Transfer): DriveReadings {
    if (transfer.kind !== 'impedance') return this.readingsOf('sources');
    return this.readingsOf([{ into: transfer.one, outOf: transfer.other, current: this.builder.one }]);
  }

  private readingsOf(drive: Drive): DriveReadings {
    const key = drive === 'sources' ? drive : drive.map(({ into, outOf }) => `${into} ${outOf}`).join();
    const known = this.drives.get(key);
    if (known !== undefined) return known;
    const readings = this.tape.drive(drive);
    this.drives.set(key, readings);
    return readings;
  }

  private want(transfer: Transfer): void {
    const readings = this.driveOf(transfer);
    for (const phasor of phasorsOfTransfer(transfer)) {
      if (phasor.kind === 'between') readings.wantVoltage(phasor.one, phasor.other);
      else readings.wantCurrent(phasor.row);
    }
  }

  private written(transfer: Transfer): Written {
    const readings = this.driveOf(transfer);
    switch (transfer.kind) {
      case 'impedance': {
        const z = readings.voltage(transfer.one, transfer.other);
        return { value: transfer.inverse ? this.builder.reciprocal(z) : z, readings };
      }
      case 'ratio': {
        const value = this.builder.div(this.phasor(readings, transfer.of), this.phasor(readings, transfer.to));
        return { value, readings };
      }
      default:
        return { value: this.phasor(readings, transfer), readings };
    }
  }

  private phasor(readings: DriveReadings, phasor: Phasor): Value {
    return phasor.kind === 'between' ? readings.voltage(phasor.one, phasor.other) : readings.current(phasor.row);
  }

  private power(rows: readonly number[]): Value {
    const readings = this.readingsOf('sources');
    return rows.reduce((total, row) => {
      const voltage = readings.voltage(...ends(this.network, row));
      return this.builder.mulAdd(total, voltage, conjugate(readings.current(row)));
    }, ZERO);
  }

  /** The rows that the derivatives of an output are wanted by. */
  private rowsOf(output: Output): readonly number[] {
    if (output.kind === 'derivative') return [output.row];
    return this.network.laws.flatMap((law, row) => (dependsOnFrequency(law) ? [row] : []));
  }

  /** ∂X/∂y for the rows. */
  private differentiate(transfer: Transfer, rows: readonly number[]): Derivatives {
    const { builder } = this;
    const { readings } = this.written(transfer);
    const gradient: Gradient = { probes: [], currents: new Map(), direct: new Map() };
    this.weigh(transfer, readings, gradient);
    const adjoint: AdjointReadings = this.tape.adjoint(gradient);
    for (const row of rows) adjoint.wantVoltage(...ends(this.network, row));
    adjoint.solve();
    const byRow = new Map(
      rows.map((row) => {
        const nodes = ends(this.network, row);
        const effect = builder.sub(gradient.direct.get(row) ?? ZERO, adjoint.voltage(...nodes));
        return [row, builder.mulAdd(adjoint.elsewhere(row, readings), readings.voltage(...nodes), effect)];
      }),
    );
    return { byRow, slope: adjoint.slope(readings) };
  }

  private weigh(transfer: Transfer, readings: DriveReadings, gradient: Gradient): void {
    const { builder } = this;
    switch (transfer.kind) {
      case 'impedance': {
        const z = readings.voltage(transfer.one, transfer.other);
        const weight = transfer.inverse ? negative(square(builder, builder.reciprocal(z))) : builder.one;
        gradient.probes.push({ into: transfer.one, outOf: transfer.other, current: weight });
        return;
      }
      case 'ratio': {
        const to = builder.reciprocal(this.phasor(readings, transfer.to));
        this.weighPhasor(readings, transfer.of, to, gradient);
        const value = builder.mul(this.phasor(readings, transfer.of), to);
        this.weighPhasor(readings, transfer.to, negative(builder.mul(value, to)), gradient);
        return;
      }
      default:
        this.weighPhasor(readings, transfer, builder.one, gradient);
    }
  }

  private weighPhasor(readings: DriveReadings, phasor: Phasor, weight: Value, { probes, currents, direct }: Gradient): void {
    const { builder, tape } = this;
    if (phasor.kind === 'between') {
      probes.push({ into: phasor.one, outOf: phasor.other, current: weight });
      return;
    }
    for (const { row, sign } of readings.partsOfCurrent(phasor.row)) {
      const signed = sign < 0 ? negative(weight) : weight;
      if (!isAdmittance(this.network.laws[row])) {
        currents.set(row, builder.add(currents.get(row) ?? ZERO, signed));
        continue;
      }
      const [into, outOf] = ends(this.network, row);
      probes.push({ into, outOf, current: builder.mul(signed, tape.admittances.of(row)) });
      direct.set(row, builder.add(direct.get(row) ?? ZERO, signed));
    }
  }

  /** τ = −Re[(dH/ds)/H] = −Im[(s·dH/ds)/H]/ω, with s·dH/ds = Σ (s·dy/ds)·∂H/∂y. */
  private groupDelay(transfer: Transfer, derivatives: Derivatives | undefined): Value {
    const { builder } = this;
    let change = derivatives?.slope ?? ZERO;
    for (const [row, derivative] of derivatives?.byRow ?? []) {
      change = builder.mulAdd(change, this.tape.admittances.logarithmicSlope(row), derivative);
    }
    const relative = builder.div(change, this.written(transfer).value);
    return { re: -builder.mulParts(relative.im, this.inputs.inverseOmega), im: NOTHING };
  }

  /** ∂X/∂p from ∂X/∂y: y = 1/R, jωC, 1/(jωL). */
  private byValue(row: number, byAdmittance: Value): Value {
    const { builder, inputs, network, tape } = this;
    if (isZero(byAdmittance)) return ZERO;
    const law: Law | undefined = network.laws[row];
    switch (law?.law) {
      case 'resistance':
        return negative(builder.mul(square(builder, tape.admittances.of(row)), byAdmittance));
      case 'capacitance':
        return builder.mul(timesJ(real(inputs.omega)), byAdmittance);
      case 'inductance': {
        const inverse = builder.reciprocal(real(inputs.scalar(row, 'L', (of) => (of.law === 'inductance' ? of.inductance : NaN))));
        return negative(builder.mul(builder.mul(inverse, tape.admittances.of(row)), byAdmittance));
      }
      default:
        return ZERO;
    }
  }
}

function hasEquations({ laws }: Network): boolean {
  return laws.some(({ law }) => law === 'equation');
}

function dependsOnFrequency({ law }: Law): boolean {
  return law === 'capacitance' || law === 'inductance' || law === 'impedance';
}

function square(builder: TapeBuilder, value: Value): Value {
  return builder.mul(value, value);
}

function real(part: Part): Value {
  return { re: part, im: NOTHING };
}
