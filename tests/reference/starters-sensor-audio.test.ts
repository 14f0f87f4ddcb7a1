import { describe, expect, it } from 'vitest';
import { capacitor, inductor, network, resistor, voltageSource } from '../solver/support/networks';
import {
  crossing,
  degrees,
  expectFigure,
  impedance,
  level,
  magnitude,
  peak,
  reflection,
  voltage,
} from './support/measure';

/**
 * Starter networks of the library that resistors, capacitors, inductors and sources build: sensor, measuring, audio
 * and filter networks. Each figure was computed with an independent modified-nodal phasor solver [computed]; each
 * value is held to the last digit of the figure. Formulas are the published classics named with them.
 */
const HALF_POWER = -10 * Math.log10(2);

describe('ST-01 first-order low-pass, loaded', () => {
  const list = network(
    voltageSource('V1', 's', '0', 1),
    resistor('Rs', 's', 'a', 600),
    resistor('R1', 'a', 'out', 4700),
    capacitor('C1', 'out', '0', 3.3e-9),
    resistor('RL', 'out', '0', 1e5),
  );
  it('loses 0.449 dB at 0 Hz, 20.859 dB at 100 kHz, half its power at 9582.1 Hz', () => {
    const direct = level(list, 0, 'out', 1);
    expectFigure(direct, '-0.449');
    expectFigure(level(list, 1e5, 'out', 1), '-20.859');
    expectFigure(
      crossing((f) => level(list, f, 'out', 1) - direct - HALF_POWER, 1e3, 1e5),
      '9582.1',
    );
  });
  it('has H = 0.657034 at −46.2227° at 10 kHz, and thermal noise by the real part of its output impedance', () => {
    const h = voltage(list, 1e4, 'out');
    expectFigure(magnitude(h), '0.657034');
    expectFigure(degrees(h), '-46.2227');
    const dead = list.elements.filter(({ id }) => id !== 'V1');
    const seen = impedance([...dead, resistor('short', 's', '0', 0)], 1e4, 'out');
    // √(4kT·Re Z) at 300 K, nV/√Hz (Johnson and Nyquist 1928).
    expectFigure(Math.sqrt(4 * 1.380649e-23 * 300 * seen.re) * 1e9, '6.3179');
  });
});

describe('ST-02 coupling capacitor', () => {
  const list = network(
    voltageSource('V1', 's', '0', 1),
    resistor('Rs', 's', 'a', 1000),
    capacitor('C1', 'a', 'out', 2.2e-6),
    resistor('RL', 'out', '0', 47e3),
  );
  it('has its half-power frequency at 1.5071 Hz, loses 0.183 dB above, and turns 4.31° at 20 Hz', () => {
    const high = level(list, 1e6, 'out', 1);
    expectFigure(high, '-0.183');
    expectFigure(
      crossing((f) => level(list, f, 'out', 1) - high - HALF_POWER, 0.1, 100),
      '1.5071',
    );
    expectFigure(degrees(voltage(list, 20, 'out')), '4.31');
  });
});

describe('ST-03 two-section low-pass without a buffer', () => {
  const list = network(
    voltageSource('V1', 's', '0', 1),
    resistor('R1', 's', 'a', 3900),
    capacitor('C1', 'a', '0', 6.8e-9),
    resistor('R2', 'a', 'out', 3900),
    capacitor('C2', 'out', '0', 6.8e-9),
  );
  it('has −9.542 dB and −90° at 6001.3 Hz, and half its power at 0.3742 of that', () => {
    const f0 = 1 / (2 * Math.PI * 3900 * 6.8e-9);
    expectFigure(f0, '6001.3');
    expectFigure(level(list, f0, 'out', 1), '-9.542');
    expectFigure(degrees(voltage(list, f0, 'out')), '-90.000');
    const half = crossing((f) => level(list, f, 'out', 1) - HALF_POWER, 100, f0);
    expectFigure(half, '2245.9');
    expectFigure(half / f0, '0.3742');
  });
});

describe('ST-04 twin-T band-stop', () => {
  const list = network(
    voltageSource('V1', 's', '0', 1),
    resistor('R1', 's', 'a', 46.4e3),
    resistor('R2', 'a', 'out', 46.4e3),
    capacitor('C3', 'a', '0', 136e-9),
    capacitor('C1', 's', 'b', 68e-9),
    capacitor('C2', 'b', 'out', 68e-9),
    resistor('R3', 'b', '0', 23.2e3),
  );
  it('stops 50.442 Hz, loses 47.13 dB at 50 Hz, and half its power at 11.91 and 213.68 Hz', () => {
    const stop = peak((f) => -magnitude(voltage(list, f, 'out')), 40, 60);
    expectFigure(Math.round(stop * 1000) / 1000, '50.442');
    expectFigure(level(list, 50, 'out', 1), '-47.13');
    const half = (f: number): number => level(list, f, 'out', 1) - HALF_POWER;
    expectFigure(crossing(half, 1, 50), '11.91');
    expectFigure(crossing(half, 51, 1000), '213.68');
  });
});

describe('ST-05 series–parallel RC arm', () => {
  it('passes a third at 0° at 1061.03 Hz', () => {
    const list = network(
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 1e4),
      capacitor('C1', 'a', 'out', 15e-9),
      resistor('R2', 'out', '0', 1e4),
      capacitor('C2', 'out', '0', 15e-9),
    );
    const f0 = crossing((f) => degrees(voltage(list, f, 'out')), 500, 2000);
    expectFigure(f0, '1061.03');
    expectFigure(magnitude(voltage(list, f0, 'out')), '0.33333');
  });
});

describe('ST-11 third-order Butterworth low-pass, 600 Ω', () => {
  it('has half its power at 3200.2 Hz and −28.51 dB at 9.6 kHz', () => {
    const list = network(
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 600),
      capacitor('C1', 'a', '0', 82e-9),
      inductor('L1', 'a', 'b', 60e-3),
      capacitor('C2', 'b', '0', 82e-9),
      resistor('RL', 'b', '0', 600),
    );
    expectFigure(
      crossing((f) => level(list, f, 'b', 1) - HALF_POWER, 1e3, 1e4),
      '3200.2',
    );
    expectFigure(level(list, 9600, 'b', 1), '-28.51');
  });
});

describe('ST-12 fifth-order Chebyshev, 0.5 dB, 75 Ω, 12 MHz (Matthaei, Young and Jones 1964)', () => {
  const ladder = (c1: number, l2: number, c3: number) =>
    network(
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 75),
      capacitor('C1', 'a', '0', c1),
      inductor('L2', 'a', 'b', l2),
      capacitor('C3', 'b', '0', c3),
      inductor('L4', 'b', 'c', l2),
      capacitor('C5', 'c', '0', c1),
      resistor('RL', 'c', '0', 75),
    );
  it('has −0.5001 dB at 12 MHz and −42.039 dB at 24 MHz with ideal values', () => {
    const omega = 2 * Math.PI * 12e6;
    const ideal = ladder(1.70582 / (omega * 75), (1.22961 * 75) / omega, 2.54088 / (omega * 75));
    // The figure is −0.5001: these five-digit values give −0.50005, one unit of its last digit away at most.
    expect(Math.abs(level(ideal, 12e6, 'c', 1) + 0.5001)).toBeLessThanOrEqual(1e-4);
    expectFigure(level(ideal, 24e6, 'c', 1), '-42.039');
  });
  it('has −0.668 dB and −42.00 dB with standard values', () => {
    const standard = ladder(300e-12, 1.2e-6, 470e-12);
    expectFigure(level(standard, 12e6, 'c', 1), '-0.668');
    expectFigure(level(standard, 24e6, 'c', 1), '-42.00');
  });
});

describe('ST-13 third-order Butterworth high-pass, 50 Ω', () => {
  it('has half its power at 1.7952 MHz and −28.39 dB at 600 kHz', () => {
    const list = network(
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 50),
      capacitor('C1', 'a', 'b', 1.8e-9),
      inductor('L1', 'b', '0', 2.2e-6),
      capacitor('C2', 'b', 'c', 1.8e-9),
      resistor('RL', 'c', '0', 50),
    );
    expectFigure(crossing((f) => level(list, f, 'c', 1) - HALF_POWER, 1e6, 3e6) / 1e6, '1.7952');
    expectFigure(level(list, 600e3, 'c', 1), '-28.39');
  });
});

describe('ST-14 m-derived T section, m = 0.6 (Zobel 1923)', () => {
  it('passes 3 kHz, stops 6391.8 Hz, and rises again', () => {
    const list = network(
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 600),
      inductor('L1', 'a', 'b', 11.5e-3),
      capacitor('C1', 'b', 'x', 62e-9),
      inductor('L2', 'x', '0', 10e-3),
      inductor('L3', 'b', 'c', 11.5e-3),
      resistor('RL', 'c', '0', 600),
    );
    expectFigure(level(list, 3e3, 'c', 1), '-0.093');
    expectFigure(level(list, 5e3, 'c', 1), '-4.915');
    expectFigure(level(list, 20e3, 'c', 1), '-12.74');
    expectFigure(
      crossing(
        (f) => impedance([capacitor('C1', 'b', 'x', 62e-9), inductor('L2', 'x', '0', 10e-3)], f, 'b').im,
        5e3,
        8e3,
      ),
      '6391.8',
    );
  });
});

describe('ST-15 disc-replay equaliser, passive (IEC 60098; Lipshitz 1979)', () => {
  it('has the standard’s shape: +19.274 dB at 20 Hz, −19.620 dB at 20 kHz, re 1 kHz', () => {
    // The starter's values have four digits; the time constants are the standard's.
    const [t1, t2, t3] = [3180e-6, 318e-6, 75e-6];
    const c1 = 33e-9;
    const r1 = (t1 * t3) / t2 / c1;
    const c2 = 2.916 * c1;
    const list = network(
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'out', r1),
      capacitor('C1', 'out', '0', c1),
      resistor('R2', 'out', 'x', t2 / c2),
      capacitor('C2', 'x', '0', c2),
    );
    const middle = level(list, 1000, 'out', 1);
    expectFigure(middle, '-19.911');
    expectFigure(level(list, 20, 'out', 1) - middle, '19.274');
    expectFigure(level(list, 20e3, 'out', 1) - middle, '-19.620');
  });
});

describe('ST-17 bridge of 350 Ω arms with cable capacitance', () => {
  it('gives 5.000 mV, 4.9942 mV at 10 kHz, and turns over at 206.7 kHz', () => {
    const list = network(
      voltageSource('V1', 's', '0', 5),
      resistor('R1', 's', 'p', 350 * 0.999),
      resistor('R2', 'p', '0', 350 * 1.001),
      resistor('R3', 's', 'n', 350 * 1.001),
      resistor('R4', 'n', '0', 350 * 0.999),
      capacitor('C1', 'p', 'n', 2.2e-9),
    );
    const output = (f: number): number => {
      const [p, n] = [voltage(list, f, 'p'), voltage(list, f, 'n')];
      return magnitude({ re: p.re - n.re, im: p.im - n.im }) * 1000;
    };
    expectFigure(output(0), '5.000');
    expectFigure(output(1e4), '4.9942');
    expectFigure(crossing((f) => output(f) - output(0) * Math.SQRT1_2, 1e5, 1e6) / 1000, '206.7');
  });
});

describe('a two-port: 50 + j25 Ω in series, in 50 Ω', () => {
  it('has S11 0.351351 + j0.108108 and S21 0.648649 − j0.108108', () => {
    const omega = 2 * Math.PI * 1000;
    const arm = [resistor('R1', 'a', 'x', 50), inductor('L1', 'x', 'b', 25 / omega)];
    const seen = reflection(impedance([...arm, resistor('RL', 'b', '0', 50)], 1000, 'a'), 50);
    expectFigure(seen.re, '0.351351');
    expectFigure(seen.im, '0.108108');
    const list = network(
      voltageSource('V1', 's', '0', 2),
      resistor('Rs', 's', 'a', 50),
      ...arm,
      resistor('RL', 'b', '0', 50),
    );
    const through = voltage(list, 1000, 'b');
    expectFigure(through.re, '0.648649');
    expectFigure(through.im, '-0.108108');
  });
});
