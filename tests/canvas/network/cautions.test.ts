import { describe, expect, it } from 'vitest';
import { CAUTION_ADVICE, ENERGY_LIMITS, VOLTAGE_LIMIT } from '@/canvas/network/cautions';
import { readNetwork } from '@/canvas/network/readings';
import { SheetBuilder } from '../../support/sheet-builder';

/** A source with a capacitor across it, the foot of both on the reference. */
function across(source: Readonly<Record<string, string>>, capacitance = '1n', operatingFrequency = '1 kHz') {
  const sheet = new SheetBuilder();
  const vs = sheet.part('voltageSource', 0, 0, { turn: 90, values: source });
  const c = sheet.capacitor(100, 0, capacitance, 90);
  sheet.wire(vs, c);
  sheet.wire([vs, 'b'], [c, 'b']);
  sheet.wire([c, 'b'], sheet.reference(100, 100));
  return readNetwork(sheet.document({ operatingFrequency })).cautions;
}

const rms = (amplitude: string, more: Readonly<Record<string, string>> = {}) => ({ amplitude, measure: 'rms', ...more });

describe('the caution for a voltage', () => {
  it('has the limits of extra-low voltage and names where they come from', () => {
    expect(VOLTAGE_LIMIT).toMatchObject({ acRms: 50, dc: 120 });
    expect(VOLTAGE_LIMIT.source).toContain('IEC 61140');
    for (const word of ['Isolate', 'discharge', 'local codes', 'licensed']) expect(CAUTION_ADVICE).toContain(word);
  });

  it.each([
    ['50', 0],
    ['50.01', 1],
    ['49.99', 0],
    ['-51', 1],
  ])('at %s V AC stands %i times', (amplitude, count) => {
    expect(across(rms(amplitude))).toHaveLength(count);
  });

  it.each([
    ['120', 0],
    ['120.01', 1],
    ['-130', 1],
    ['100', 0],
  ])('at %s V direct stands %i times', (amplitude, count) => {
    expect(across(rms(amplitude, { frequency: '0' }))).toHaveLength(count);
  });

  it('counts rms, however the source was given', () => {
    expect(across({ amplitude: '70', measure: 'peak' })).toHaveLength(0);
    expect(across({ amplitude: '71', measure: 'peak' })).toHaveLength(1);
    expect(across({ amplitude: '142', measure: 'peakToPeak' })).toHaveLength(1);
  });

  it('stands at the node, at the parts on it, and says how much is there', () => {
    const [caution] = across(rms('230'));
    expect(caution).toMatchObject({ kind: 'voltage', parts: ['voltageSource-1', 'capacitor-1'], source: VOLTAGE_LIMIT.source });
    expect(caution?.message).toMatch(/230\sV AC \(rms\), above 50 V/);
    expect(caution?.pins).toHaveLength(2);
  });

  it('stands for a source of another frequency too: dead in the readings is not dead on the bench', () => {
    expect(across(rms('230', { frequency: '50 Hz' }))).toHaveLength(1);
    expect(across(rms('230', { frequency: '0' }))).toHaveLength(1);
  });

  it('adds AC voltages of several frequencies as squares', () => {
    const series = (first: string, second: string) => {
      const sheet = new SheetBuilder();
      const low = sheet.part('voltageSource', 0, 0, { turn: 90, values: rms(first, { frequency: '50' }) });
      const high = sheet.part('voltageSource', 0, -100, { turn: 90, values: rms(second) });
      const load = sheet.resistor(100, 0, '1k', 90);
      sheet.wire([high, 'b'], low);
      sheet.wire(high, load);
      sheet.wire([low, 'b'], [load, 'b']);
      sheet.wire([low, 'b'], sheet.reference(0, 100));
      return readNetwork(sheet.document()).cautions;
    };
    expect(series('30', '39.9')).toHaveLength(0);
    expect(series('30', '40.1')).toHaveLength(1);
  });

  it('counts a source once whose own frequency is the operating one but for rounding', () => {
    // √2 · 40 V would be above the limit, 40 V is not.
    const sheet = new SheetBuilder();
    const own = sheet.part('voltageSource', 0, 0, { turn: 90, values: rms('40', { frequency: '62.83185307179586 krad/s' }) });
    const operating = sheet.part('voltageSource', 200, 0, { turn: 90, values: rms('1') });
    for (const [source, x] of [[own, 100], [operating, 300]] as const) {
      const load = sheet.resistor(x, 0, '1k', 90);
      sheet.wire(source, load);
      sheet.wire([source, 'b'], [load, 'b']);
      sheet.wire([load, 'b'], sheet.reference(x, 100));
    }
    expect(readNetwork(sheet.document({ operatingFrequency: '10 kHz' })).cautions).toEqual([]);
  });

  it('stands between two nodes that are each below the limit', () => {
    const sheet = new SheetBuilder();
    const up = sheet.part('voltageSource', 0, -50, { turn: 90, values: rms('40') });
    const down = sheet.part('voltageSource', 0, 50, { turn: 90, values: rms('40') });
    const load = sheet.resistor(100, 0, '1k', 90);
    sheet.wire([up, 'b'], down);
    sheet.wire(up, load);
    sheet.wire([down, 'b'], [load, 'b']);
    sheet.wire(down, sheet.reference(-100, 0));
    const { cautions } = readNetwork(sheet.document());
    expect(cautions).toHaveLength(1);
    expect(cautions[0]).toMatchObject({ kind: 'voltage', parts: [load], message: expect.stringContaining('Across R1') });
  });

  it('stands on an island that has no reference node', () => {
    const sheet = new SheetBuilder();
    const source = sheet.part('voltageSource', 0, 0, { turn: 90, values: rms('230') });
    const load = sheet.resistor(100, 0, '1k', 90);
    sheet.wire(source, load);
    sheet.wire([source, 'b'], [load, 'b']);
    const { cautions } = readNetwork(sheet.document());
    expect(cautions.flatMap(({ parts }) => parts).sort()).toEqual([load, source].sort());
  });
});

describe('the caution for stored energy', () => {
  // ½·C·V² at 100 V direct: 20 µF hold 0.1 J, 50 µF 0.25 J, 2 mF 10 J.
  const direct = (capacitance: string) => across(rms('100', { frequency: '0' }), capacitance).filter(({ kind }) => kind === 'energy');

  it('has its limits', () => {
    expect(ENERGY_LIMITS).toMatchObject({ discharge: 0.1, heavyShock: 0.25, possiblyLethal: 10 });
  });

  it.each([
    ['20u', 0, ''],
    ['19.9u', 0, ''],
    ['20.1u', 1, 'provision for discharge'],
    ['49.9u', 1, 'provision for discharge'],
    ['50u', 1, 'heavy shock'],
    ['1999u', 1, 'heavy shock'],
    ['2000u', 1, 'lethal'],
    ['1', 1, 'lethal'],
  ])('with %s at 100 V stands %i times: %s', (capacitance, count, words) => {
    const cautions = direct(capacitance);
    expect(cautions).toHaveLength(count);
    if (count > 0) expect(cautions[0]?.message).toContain(words);
  });

  it('says from where a shock is heavy and possibly lethal at every level below', () => {
    expect(direct('20.1u')[0]?.message).toMatch(/0\.25 J.*10 J/);
    expect(direct('20.1u')[0]?.source).toBe(ENERGY_LIMITS.source);
  });

  it('takes the crest of an alternating voltage, and all voltages together', () => {
    // 40 V rms have a crest of 56.6 V: 100 µF hold 0.16 J at most, not the 0.08 J of the rms value.
    expect(across(rms('40'), '100u').filter(({ kind }) => kind === 'energy')).toHaveLength(1);
    expect(across(rms('40'), '60u').filter(({ kind }) => kind === 'energy')).toHaveLength(0);
  });
});
