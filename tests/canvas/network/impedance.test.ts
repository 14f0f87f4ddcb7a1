import { describe, expect, it } from 'vitest';
import { impedanceOf } from '@/canvas/network/impedance';

const nodes = ['1', '0'] as const;

describe('the impedance of an element from its own value', () => {
  it('is R, jωL and 1/(jωC)', () => {
    expect(impedanceOf({ kind: 'resistor', id: 'R1', nodes, resistance: 604 }, 50)).toEqual({ kind: 'ohms', ohms: { re: 604, im: 0 } });
    expect(impedanceOf({ kind: 'inductor', id: 'L1', nodes, inductance: 0.06 }, 2000)).toEqual({
      kind: 'ohms',
      ohms: { re: 0, im: 2 * Math.PI * 2000 * 0.06 },
    });
    expect(impedanceOf({ kind: 'capacitor', id: 'C1', nodes, capacitance: 82e-9 }, 2000)).toEqual({
      kind: 'ohms',
      ohms: { re: 0, im: -1 / (2 * Math.PI * 2000 * 82e-9) },
    });
  });

  it('is open for a capacitor and closed for an inductor at 0 Hz', () => {
    expect(impedanceOf({ kind: 'capacitor', id: 'C1', nodes, capacitance: 1e-6 }, 0)).toEqual({ kind: 'open' });
    expect(impedanceOf({ kind: 'inductor', id: 'L1', nodes, inductance: 1e-3 }, 0)).toEqual({ kind: 'closed' });
  });

  it('is open or closed, never infinite or undefined, for a value of zero', () => {
    expect(impedanceOf({ kind: 'resistor', id: 'R1', nodes, resistance: 0 }, 50)).toEqual({ kind: 'closed' });
    expect(impedanceOf({ kind: 'capacitor', id: 'C1', nodes, capacitance: 0 }, 50)).toEqual({ kind: 'open' });
  });

  it('is none for a source', () => {
    const value = { rms: 1, phase: 0, frequency: null };
    expect(impedanceOf({ kind: 'voltageSource', id: 'VS1', nodes, value }, 50)).toBeNull();
  });
});
