import { describe, expect, it } from 'vitest';
import { sensitivity } from '@/solver/analysis/sensitivity';
import { capacitor, network, resistor, voltageSource } from '../solver/support/networks';
import { expectPrinted } from './support/expect-figure';
import { degrees, magnitude } from './support/measure';

/** Starters of the library, with figures computed by an independent modified-nodal phasor solver [computed]. */
describe('ST-01, a loaded first-order low-pass, at 10 kHz', () => {
  const list = network(
    voltageSource('V', 's', '0', 1),
    resistor('Rs', 's', 'a', 600),
    resistor('R', 'a', 'out', 4700),
    capacitor('C', 'out', '0', 3.3e-9),
    resistor('RL', 'out', '0', 100e3),
  );
  const result = sensitivity(list, { quantity: 'transfer', source: 'V', reading: { quantity: 'voltage', node: 'out' } }, [10e3]);
  if (!result.ok) throw new Error(result.message);

  it('has H = 0.657034 at −46.2227°', () => {
    const h = { re: result.re[0] ?? NaN, im: result.im[0] ?? NaN };
    expectPrinted(magnitude(h), { printed: '0.657034' });
    expectPrinted(degrees(h), { printed: '-46.2227' });
  });

  it.each([
    ['Rs', '-0.061746', '-0.053706'],
    ['R', '-0.483680', '-0.420696'],
    ['C', '-0.521334', '-0.499545'],
    ['RL', '0.024092', '-0.025143'],
  ])('has the relative sensitivity to %s', (id, re, im) => {
    const trace = result.traces.find(({ element }) => element === id);
    expectPrinted(trace?.relativeRe[0] ?? NaN, { printed: re });
    expectPrinted(trace?.relativeIm[0] ?? NaN, { printed: im });
  });

  it('sums to nothing: the resistances less the capacitance', () => {
    const sum = (part: 'relativeRe' | 'relativeIm') =>
      result.traces.reduce((total, trace) => total + (trace.field === 'capacitance' ? -1 : 1) * (trace[part][0] ?? NaN), 0);
    expect(Math.hypot(sum('relativeRe'), sum('relativeIm'))).toBeLessThan(4e-16);
  });
});

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
