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

export type { NetworkReading } from './analysis/network-reading';
export type { Problem, ProblemKind } from './analysis/problem';
export type { PowerBalance, Solution } from './analysis/solution';
export type { SolveOptions } from './analysis/steady-state';
export { solve } from './analysis/steady-state';
export type { Superposition, SuperpositionOptions, Total } from './analysis/superposition';
export { sourceFrequencies, superpose, valueAt } from './analysis/superposition';
export type { AdaptiveOptions, ResonanceHint } from './analysis/adaptive-frequencies';
export type { PreparedSweep, RunOptions, Sweep, SweepOptions, SweepProblem, SweepTrace } from './analysis/sweep';
export { prepareSweep, sweep } from './analysis/sweep';
export type { SweepOutput, SweepTransfer } from './analysis/sweep-output';
export type { SampledSweep, SamplesTrace, SweepSamplesOptions } from './analysis/sweep-samples';
export { sweepSamples } from './analysis/sweep-samples';
export { linearFrequencies, listedFrequencies, logarithmicFrequencies } from './analysis/frequency-grid';

export type {
  CancelledPair,
  PolesAndZeros,
  Root,
  Stability,
  Transfer,
} from './analysis/poles-and-zeros';
export { polesAndZeros } from './analysis/poles-and-zeros';
export type { PartialFractions, PoleTerms } from './analysis/partial-fractions';
export { partialFractions } from './analysis/partial-fractions';
export type { TimeResponse, TimeValues } from './analysis/time-response';
export { impulseResponse, stepResponse } from './analysis/time-response';

export type { Band, ResponseFunction } from './features/response';
export { HALF_POWER_DECIBELS } from './features/response';
export type { NetworkResponse } from './features/network-response';
export { networkResponse } from './features/network-response';
export { hintsOf } from './features/hints';
export type { Scan, ScanOptions } from './features/scan';
export { scanResponse } from './features/scan';
export type { Extreme, Range } from './features/extremes';
export { extremesOf, rangeOver } from './features/extremes';
export type { Crossing, Reference } from './features/crossings';
export { levelCrossings, magnitudeCrossings, phaseCrossings } from './features/crossings';
export type { Notch, PassBand, Rejection, Ripple } from './features/pass-band';
export { notchesOf, passBand, rejectionOver, rippleOver } from './features/pass-band';
export type { GainMargin, LoopMargins, PhaseMargin } from './features/loop-margins';
export { loopMargins } from './features/loop-margins';
export type { RealCurve, RealExtreme } from './features/real-curve';
export { realCrossings, realExtremes } from './features/real-curve';

export type { PortNodes, TwoPortOptions, TwoPortSweep, TwoPortTable } from './analysis/two-port';
export { matrixAt, twoPort } from './analysis/two-port';
export type { PortReferences, TwoPortKind, TwoPortMatrix } from './analysis/two-port-parameters';
export { cascade, convertTwoPort, newMatrix, renormalise } from './analysis/two-port-parameters';
export type { ImageParameters, RollettStability } from './analysis/two-port-figures';
export {
  imageParameters,
  insertionLoss,
  returnLoss,
  rollettStability,
  stabilityDistance,
  standingWaveRatio,
  transducerLoss,
} from './analysis/two-port-figures';
export type { BestLoad, Equivalent } from './analysis/equivalent';
export { equivalent } from './analysis/equivalent';
export type { Sensitivity, SensitivityOutput, SensitivityTrace } from './analysis/sensitivity';
export { decibelsPerPercent, degreesPerPercent, sensitivity } from './analysis/sensitivity';
export type { ValueField } from './analysis/value-fields';
export type { Noise, NoiseBand, NoiseContribution, NoiseOptions, NoiseTotal } from './analysis/noise';
export { BOLTZMANN, noise, noiseTotal, STANDARD_TEMPERATURE } from './analysis/noise';
export type { NodalEquation, NodalEquations, NodalTerm, NodalUnknown } from './analysis/nodal-equations';
export { nodalEquations } from './analysis/nodal-equations';
export type { Factor, Product, Sum } from './analysis/symbols';

export type { Unit } from './quantities/unit';
export type { ParsedQuantity } from './quantities/parse-quantity';
export { parseQuantity } from './quantities/parse-quantity';
export { formatAngle, formatFull, formatPolar, formatQuantity, formatRectangular } from './quantities/format-quantity';
export type { ParsedRkm } from './quantities/rkm';
export { parseRkm } from './quantities/rkm';
export type { PreferredSeries } from './quantities/preferred-values';
export { nearestPreferred, preferredValues } from './quantities/preferred-values';
