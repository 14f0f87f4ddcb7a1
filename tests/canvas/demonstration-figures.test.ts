import { describe, expect, it } from 'vitest';
import { descriptionSchema } from '@/db/seeds/description';
import { angleDegrees, magnitude, quotient, type Phasor } from '@/canvas/network/phasor';
import { readNetwork } from '@/canvas/network/readings';
import { preferredValues } from '@/solver';
import { DEMONSTRATION_SHEETS, demonstrationDescription, demonstrationSheet } from '../support/demonstration';
import { crossing, decibels, greatest, level, returnLoss, solved } from '../support/figures';

/*
 * The purposes of the demonstration sheets state figures. Each is worked out here from the network as drawn, set as
 * text, and looked for in the purpose: a value that is changed on a sheet without its purpose fails here.
 */

const HALF_POWER = decibels(Math.SQRT2);
const MAINS_CREST = 230 * Math.SQRT2;

function states(text: string, phrases: readonly string[]): void {
  for (const phrase of phrases) expect(text).toContain(phrase);
}

describe('hydrophone anti-alias low-pass', () => {
  const { document } = demonstrationSheet('hydrophone-anti-alias-low-pass');
  const out = (frequency: number, change = {}) => magnitude(solved(document, frequency, change).v('out'));
  /** Decibels below the level at low frequencies. */
  const down = (frequency: number, change = {}) => decibels(out(1, change) / out(frequency, change));
  const corner = (change = {}) => crossing((frequency) => down(frequency, change) - HALF_POWER, 1e3, 1e4);

  it('does what its purpose says', () => {
    states(document.purpose, [
      `${down(2200).toFixed(2)} dB down at 2.2 kHz`,
      `3 dB down at ${(corner() / 1e3).toFixed(2)} kHz`,
      `${down(12_000).toFixed(1)} dB down at 12 kHz`,
      `${down(21_800).toFixed(1)} dB down at 21.8 kHz`,
      `The winding of L1 takes ${decibels(0.5 / out(1)).toFixed(2)} dB`,
    ]);
  });

  it('keeps what was wanted of it', () => {
    expect(down(2200)).toBeLessThan(1);
    expect(down(12_000)).toBeGreaterThan(30);
    // Folding: with 24 kHz sampling, 21.8 kHz is the first frequency to come back as 2.2 kHz.
    expect(24_000 - 21_800).toBe(2200);
  });

  it('is changed by 10 nF at the converter as the answer to the note says', () => {
    const [note] = descriptionSchema.parse(demonstrationDescription()).notes;
    const beside = { C2: { capacitance: 82e-9 + 10e-9 } };
    states(note?.replies[0]?.text ?? '', [
      `3 dB down at ${(corner(beside) / 1e3).toFixed(2)} kHz instead of ${(corner() / 1e3).toFixed(2)} kHz`,
      `${down(2200, beside).toFixed(2)} dB down at 2.2 kHz`,
      `${down(12_000, beside).toFixed(1)} dB down at 12 kHz`,
    ]);
  });
});

describe('40 kHz transducer match', () => {
  const { document } = demonstrationSheet('transducer-match-40-khz');
  const seen = (frequency: number): Phasor => {
    const at = solved(document, frequency);
    return quotient(at.v('amp'), at.i('L1'));
  };
  const given = (frequency: number, change = {}) => solved(document, frequency, change).s('R3').re;
  const loss = (frequency: number) => returnLoss(seen(frequency), 50);

  it('does what its purpose says', () => {
    const impedance = seen(40e3);
    const straight = { L1: { inductance: 0 }, R2: { resistance: 0 }, C1: { capacitance: 0 } };
    states(document.purpose, [
      `${impedance.re.toFixed(1)} Ω − j${(-impedance.im).toFixed(1)} Ω`,
      `a return loss of ${loss(40e3).toFixed(1)} dB at 50 Ω`,
      `of the ${((5 ** 2 / (4 * 50)) * 1e3).toFixed(0)} mW available, ${(given(40e3) * 1e3).toFixed(1)} mW reach R3`,
      `against ${(given(40e3, straight) * 1e3).toFixed(1)} mW with the transducer straight across`,
      `from ${(crossing((f) => loss(f) - 10, 34e3, 40e3) / 1e3).toFixed(1)} kHz to ${(crossing((f) => loss(f) - 10, 40e3, 47e3) / 1e3).toFixed(1)} kHz`,
      `R3 ${(10 * Math.log10(given(40e3) / given(120e3))).toFixed(1)} dB less power`,
      `${magnitude(solved(document, 40e3).across('L2')).toFixed(1)} V rms stand across L2`,
    ]);
  });
});

describe('mains inlet filter', () => {
  const { document } = demonstrationSheet('mains-inlet-filter');
  const none = { capacitance: 0 };
  const without = { C1: none, C2: none, C3: none, C4: none, L3: { inductance: 0 }, L4: { inductance: 0 } };
  const noise = (frequency: number, change = {}) =>
    magnitude(solved(document, frequency, { CS1: { value: { rms: 10e-3, phase: 0, frequency } }, ...change }).across('R1'));
  const attenuation = (frequency: number) => decibels(noise(frequency, without) / noise(frequency));

  it('does at 50 Hz what its purpose says', () => {
    const at = solved(document, 50);
    states(document.purpose, [
      `${magnitude(at.i('VS1')).toFixed(3)} A from the mains with ${at.s('R5').re.toFixed(1)} W in R5`,
      `${(magnitude(at.i('C2')) * 1e6).toFixed(0)} µA to earth through C2`,
      `${(at.s('R3').re + at.s('R4').re).toFixed(3)} W in the bleeder`,
    ]);
  });

  it('is discharged by its bleeder as its purpose says', () => {
    const capacitance = 470e-9 + 470e-9 + 2.2e-9 / 2;
    const seconds = 320e3 * capacitance * Math.log(MAINS_CREST / 34);
    states(document.purpose, [`to 34 V: ${seconds.toFixed(2)} s`]);
    expect(seconds).toBeLessThan(1);
  });

  it('does at 150 kHz what its purpose says', () => {
    const at = solved(document, 150e3);
    expect(magnitude(at.across('R2'))).toBeCloseTo(magnitude(at.across('R1')), 12);
    states(document.purpose, [
      `${(magnitude(at.across('R1')) * 1e6).toFixed(1)} µV across R1 and R2 each, ${attenuation(150e3).toFixed(1)} dB less than the ${(noise(150e3, without) * 1e3).toFixed(0)} mV without`,
    ]);
    const worst = greatest((frequency) => -attenuation(frequency), 1e3, 150e3);
    states(document.purpose, [`near ${(worst.at / 1e3).toFixed(1)} kHz greater, by ${worst.value.toFixed(0)} dB`]);
  });

  it('warns of the mains voltage, also at 150 kHz, where the mains is dead in the readings', () => {
    for (const operatingFrequency of ['50 Hz', '150 kHz']) {
      const { cautions, deadSources } = readNetwork({ ...document, operatingFrequency });
      expect(cautions.filter(({ kind }) => kind === 'voltage').length).toBeGreaterThan(0);
      expect(cautions[0]?.message).toMatch(/230\sV AC/);
      expect(deadSources).toHaveLength(1);
    }
  });
});

describe('two-way monitor crossover', () => {
  const { document } = demonstrationSheet('two-way-monitor-crossover');
  const branch = (node: 'low' | 'high', frequency: number) => {
    const at = solved(document, frequency);
    return quotient(at.v(node), at.v('in'));
  };
  /** A branch against its own pass band: the woofer's at low frequency, the tweeter's without the crossover. */
  const woofer = (frequency: number) => quotient(branch('low', frequency), branch('low', 1e-3));
  const pad = (9.1 * 5.6) / (9.1 + 5.6) / (2.4 + (9.1 * 5.6) / (9.1 + 5.6));
  const tweeter = (frequency: number) => quotient(branch('high', frequency), { re: pad, im: 0 });
  const summed = (frequency: number, sign: 1 | -1) => {
    const [low, high] = [woofer(frequency), tweeter(frequency)];
    return decibels(Math.hypot(low.re + sign * high.re, low.im + sign * high.im));
  };

  it('does what its purpose says', () => {
    const [low, high] = [branch('low', 2200), branch('high', 2200)];
    const impedance = (frequency: number) => {
      const at = solved(document, frequency);
      return magnitude(quotient(at.v('in'), at.i('R1')));
    };
    const least = -greatest((frequency) => -impedance(frequency), 20, 20e3).value;
    const hottest = greatest((frequency) => solved(document, frequency).s('R6').re, 20, 20e3);
    states(document.purpose, [
      `low is ${(-decibels(magnitude(low))).toFixed(1)} dB below in and lags ${(-angleDegrees(low)).toFixed(0)}°`,
      `high is ${(-decibels(magnitude(high))).toFixed(1)} dB below in and leads by ${angleDegrees(high).toFixed(0)}°`,
      `${(-decibels(magnitude(tweeter(2200)))).toFixed(1)} dB below its level without the crossover`,
      `a hole of ${(-summed(2200, 1)).toFixed(1)} dB at 2.2 kHz`,
      `rises by ${summed(10e3, -1).toFixed(1)} dB at 10 kHz`,
      `The amplifier sees ${least.toFixed(2)} Ω at least`,
      `R6 takes up to ${hottest.value.toFixed(1)} W, at ${(hottest.at / 1e3).toFixed(0)} kHz`,
      `by ${(-decibels(pad)).toFixed(1)} dB`,
      `${((9.8 ** 2) / 6).toFixed(0)} W in 6 Ω`,
    ]);
  });

  it('is flat as its purpose says, with the tweeter connected in reverse', () => {
    const deviation = greatest((frequency) => Math.abs(summed(frequency, -1)), 20, 3e3);
    expect(deviation.value).toBeLessThan(0.2);
  });

  it('has a woofer near 5.6 Ω at all frequencies', () => {
    for (let frequency = 20; frequency < 20e3; frequency *= 1.1) {
      const at = solved(document, frequency);
      const current = { re: at.i('R3').re + at.i('R4').re, im: at.i('R3').im + at.i('R4').im };
      expect(Math.abs(magnitude(quotient(at.v('low'), current)) - 5.6)).toBeLessThan(0.05);
    }
  });
});

describe('pump-motor power-factor bank', () => {
  const { document } = demonstrationSheet('pump-motor-power-factor-bank');
  const off = { C1: { capacitance: 0 } };
  const powerFactor = ({ re, im }: Phasor) => Math.abs(re) / Math.hypot(re, im);

  it('does what its purpose says', () => {
    const [on, before] = [solved(document, 50), solved(document, 50, off)];
    states(document.purpose, [
      `${magnitude(on.i('VS1')).toFixed(1)} A from the supply at power factor ${powerFactor(on.s('VS1')).toFixed(2)}, ${on.s('R1').re.toFixed(1)} W lost in R1`,
      `Without it: ${magnitude(before.i('VS1')).toFixed(1)} A, ${powerFactor(before.s('VS1')).toFixed(2)}, ${before.s('R1').re.toFixed(1)} W`,
      `C1 gives ${(-on.s('C1').im / 1e3).toFixed(2)} kvar at ${magnitude(on.v('motor')).toFixed(0)} V and carries ${magnitude(on.i('C1')).toFixed(2)} A`,
      `power factor ${powerFactor({ re: on.s('R3').re, im: on.s('L2').im }).toFixed(2)}; C1`,
    ]);
  });

  it('falls to 50 V in the time that its purpose says', () => {
    const crest = magnitude(solved(document, 50).v('motor')) * Math.SQRT2;
    const tau = 120e3 * 82e-6;
    states(document.purpose, [`to 50 V in ${(tau * Math.log(crest / 50)).toFixed(1)} s`, `by the time constant, ${tau.toFixed(2)} s`]);
  });

  it('resonates with the supply where its purpose says', () => {
    const seen = (frequency: number) => magnitude(solved(document, frequency, { VS1: { value: { rms: 1, phase: 0, frequency: null } } }).v('motor'));
    const { at } = greatest(seen, 500, 3000);
    states(document.purpose, [`resonate at ${(at / 1e3).toFixed(2)} kHz, near the ${Math.round(at / 50)}th harmonic`]);
  });

  it('warns of the voltage and of the energy stored', () => {
    const { cautions } = readNetwork(document);
    expect(cautions.some(({ kind }) => kind === 'voltage')).toBe(true);
    const energy = cautions.find(({ kind }) => kind === 'energy');
    const joules = (82e-6 * (magnitude(solved(document, 50).v('motor')) * Math.SQRT2) ** 2) / 2;
    expect(energy?.message).toMatch(new RegExp(`C1 stores up to ${joules.toFixed(2)}\\sJ.*heavy shock`));
    states(document.purpose, [`stores up to ${joules.toFixed(2)} J`]);
  });
});

describe('hydrophone preamplifier', () => {
  const { document } = demonstrationSheet('hydrophone-preamplifier');
  const gain = (frequency: number, change = {}) => level(solved(document, frequency, change).v('out'), { re: 1e-3, im: 0 });
  const noCable = { C2: { capacitance: 0 } };

  it('does what its purpose says', () => {
    const corner = (from: number, to: number, change = {}) => crossing((f) => gain(f, change) - (20 - HALF_POWER), from, to);
    const out = solved(document, 1e3).v('out');
    states(document.purpose, [
      `${(magnitude(out) * 1e3).toFixed(2)} mV at out for 1 mV, ${angleDegrees(out).toFixed(1)}° ahead`,
      `3 dB below 20 dB at ${corner(1, 1e3).toFixed(1)} Hz and at ${(corner(1e3, 1e6) / 1e3).toFixed(1)} kHz`,
      `changes by ${(gain(1e3, noCable) - gain(1e3)).toFixed(3)} dB at 1 kHz, and the upper corner is ${(corner(1e3, 1e6, noCable) / 1e3).toFixed(1)} kHz`,
    ]);
    // −195 dB re 1 V/µPa and 135 dB re 1 µPa are −60 dB re 1 V.
    expect(decibels(1e-3)).toBeCloseTo(-195 + 135, 12);
  });

  it('is an inverting amplifier with an ideal op-amp, exactly, at every frequency', () => {
    for (let frequency = 1; frequency < 2e6; frequency *= 3) {
      const omega = 2 * Math.PI * frequency;
      const at = solved(document, frequency);
      // The inverting input is at 0 V, and the whole current of R1 flows on through R2 ∥ C3 to the output.
      const current = at.i('R1');
      const feedback = quotient({ re: 1, im: 0 }, { re: 1 / 33e6, im: omega * 470e-12 });
      const out = { re: -(current.re * feedback.re - current.im * feedback.im), im: -(current.re * feedback.im + current.im * feedback.re) };
      const { re, im } = at.v('out');
      const size = magnitude(out);
      expect(Math.hypot(re - out.re, im - out.im) / size).toBeLessThan(1e-12);
      const input = { re: at.v('cable').re - at.across('R1').re, im: at.v('cable').im - at.across('R1').im };
      expect(magnitude(input) / magnitude(at.v('cable'))).toBeLessThan(1e-9);
    }
  });

  it('keeps the op-amp’s stand-in equal and opposite to the feedback', () => {
    const value = (designator: string) => Object.values(document.parts.find((part) => part.designator === designator)?.values ?? {})[0];
    expect(value('R3')).toBe(`-${value('R2')}`);
    expect(value('C4')).toBe(`-${value('C3')}`);
  });
});

describe('the parts of the demonstration sheets', () => {
  /** What is not bought: a measured equivalent circuit, an instrument, a winding's resistance, a stand-in. */
  const NOT_BOUGHT: Readonly<Record<string, readonly string[]>> = {
    'hydrophone-anti-alias-low-pass': ['R2'],
    'hydrophone-preamplifier': ['R3', 'C4'],
    'mains-inlet-filter': ['R1', 'R2', 'L1', 'L2'],
    'pump-motor-power-factor-bank': ['R1', 'L1', 'R3', 'L2'],
    'transducer-match-40-khz': ['R1', 'R2', 'C2', 'L2', 'C3', 'R3'],
    'two-way-monitor-crossover': ['R1', 'R2', 'R4', 'L2', 'R5', 'R8', 'L4'],
  };
  const SERIES = [...preferredValues('E24'), ...preferredValues('E96')].map((value) => value.toPrecision(3));

  it.each(DEMONSTRATION_SHEETS)('of %s have preferred values (IEC 60063, E24 or E96) where they are bought', (key) => {
    const { network } = readNetwork(demonstrationSheet(key).document);
    const bought = network.list.elements.filter(({ id, kind }) => !NOT_BOUGHT[key]?.includes(id) && kind !== 'voltageSource' && kind !== 'currentSource');
    expect(bought.length).toBeGreaterThan(1);
    for (const element of bought) {
      const value = 'resistance' in element ? element.resistance : 'capacitance' in element ? element.capacitance : 'inductance' in element ? element.inductance : NaN;
      const mantissa = Number(value.toExponential().split('e')[0]);
      expect([element.id, SERIES.includes(mantissa.toPrecision(3))]).toEqual([element.id, true]);
    }
  });
});
