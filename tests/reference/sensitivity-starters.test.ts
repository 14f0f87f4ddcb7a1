import { describe, it } from 'vitest';
import { sensitivity } from '@/solver';
import { capacitor, network, resistor, voltageSource } from '../solver/support/networks';
import { expectPrinted } from './support/expect-figure';

/** A starter of the library, with figures computed by an independent modified-nodal phasor solver [computed]. */
describe('ST-08, a multiple-feedback low-pass: Σ_L S + Σ_C S = ∂ln H/∂ln ω, whose imaginary part is −ω·τ', () => {
  const list = network(
    voltageSource('V', 's', '0', 1),
    resistor('R1', 's', 'a', 7500),
    resistor('R2', 'a', 'out', 15e3),
    resistor('R3', 'a', 'm', 2210),
    capacitor('C1', 'a', '0', 47e-9),
    capacitor('C2', 'm', 'out', 10e-9),
    { id: 'A', kind: 'operationalAmplifier', nodes: ['0', 'm', 'out'] },
  );

  it.each([
    [1e-3, '216.30'],
    [500, '211.88'],
  ])('at %s Hz the group delay is %s µs', (frequency, printed) => {
    const result = sensitivity(list, { quantity: 'voltage', node: 'out' }, [frequency]);
    if (!result.ok) throw new Error(result.message);
    const sum = result.traces.reduce((total, { field, relativeIm }) => total + (field === 'capacitance' ? (relativeIm[0] ?? NaN) : 0), 0);
    expectPrinted((-sum / (2 * Math.PI * frequency)) * 1e6, { printed });
  });
});
