/**
 * The solver's front door, and the only place from which the rest of the project takes it: an element list goes in,
 * readings or a problem in words come out. Nothing in this folder imports anything from outside it but complex.js
 * and ml-matrix, and nothing in it touches a screen or a network.
 */
export type {
  Capacitor,
  ComplexPair,
  CoupledInductors,
  CurrentControlledCurrentSource,
  CurrentControlledVoltageSource,
  CurrentSource,
  Element,
  ElementKind,
  ElementList,
  IdealTransformer,
  Impedance,
  ImpedancePoint,
  Inductor,
  Line,
  NodePair,
  NodeQuad,
  OperationalAmplifier,
  Resistor,
  ScatteringPoint,
  SourceValue,
  TwoPort,
  VoltageControlledCurrentSource,
  VoltageControlledVoltageSource,
  VoltageSource,
} from './elements/element-list';
export { REFERENCE_NODE } from './elements/element-list';
export { sameFrequency } from './elements/source-value';
export type { ElementListResult } from './elements/validate-element-list';
export { validateElementList } from './elements/validate-element-list';

export type { Problem, ProblemKind } from './analysis/problem';
export type { PowerBalance, Solution } from './analysis/solution';
export type { SolveOptions } from './analysis/steady-state';
export { solve } from './analysis/steady-state';
export type { Superposition, SuperpositionOptions, Total } from './analysis/superposition';
export { sourceFrequencies, superpose, valueAt } from './analysis/superposition';
export type { Sweep, SweepOptions, SweepProblem, SweepTrace } from './analysis/sweep';
export type { SweepOutput } from './analysis/sweep-output';
export { sweep } from './analysis/sweep';

export type { Unit } from './quantities/unit';
export type { ParsedQuantity } from './quantities/parse-quantity';
export { parseQuantity } from './quantities/parse-quantity';
export { formatAngle, formatFull, formatPolar, formatQuantity, formatRectangular } from './quantities/format-quantity';
export type { ParsedRkm } from './quantities/rkm';
export { parseRkm } from './quantities/rkm';
export type { PreferredSeries } from './quantities/preferred-values';
export { nearestPreferred, preferredValues } from './quantities/preferred-values';
