import { describe, expect, it } from 'vitest';
import { noise, noiseTotal } from '@/solver/analysis/noise';
import { capacitor, network, resistor, voltageSource } from '../solver/support/networks';
import { expectPrinted } from './support/expect-figure';

/**
 * Thermal noise of ST-01, a loaded first-order low-pass, at 300 K; figures computed with an independent modified-nodal
 * phasor solver [computed].
 */
describe('ST-01 at 300 K', () => {
  const list = network(
    voltageSource('V', 's', '0', 1),
    resistor('Rs', 's', 'a', 600),
    resistor('R', 'a', 'out', 4700),
    capacitor('C', 'out', '0', 3.3e-9),
    resistor('RL', 'out', '0', 100e3),
  );
  const nanovolts = (volts: number | undefined): number => (volts ?? NaN) * 1e9;

  it('has 2.0716, 5.7979 and 1.4174 nV/√Hz of its resistances at 10 kHz, 6.3179 in all', () => {
    const result = noise(list, ['out', '0'], { frequencies: [10e3], temperature: 300 });
    if (!result.ok) throw new Error(result.message);
    expect(result.contributions.map(({ element }) => element)).toEqual(['Rs', 'R', 'RL']);
    const [source, series, load] = result.contributions;
    expectPrinted(nanovolts(source?.density[0]), { printed: '2.0716' });
    expectPrinted(nanovolts(series?.density[0]), { printed: '5.7979' });
    expectPrinted(nanovolts(load?.density[0]), { printed: '1.4174' });
    expectPrinted(nanovolts(result.density[0]), { printed: '6.3179' });
  });

  it('has √(kT/C) = 1.1203 µV in all, within a noise bandwidth of 15 051 Hz', () => {
    const total = noiseTotal(list, ['out', '0'], { from: 0, to: 1e12, temperature: 300 });
    const still = noise(list, ['out', '0'], { frequencies: [0], temperature: 300 });
    if (!total.ok || !still.ok) throw new Error('not found');
    expectPrinted(total.total * 1e6, { printed: '1.1203' });
    expectPrinted(total.total ** 2 / (still.density[0] ?? NaN) ** 2, { printed: '15051' });
  });
});
