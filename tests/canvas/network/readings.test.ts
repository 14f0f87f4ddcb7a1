import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { SheetDocument } from '@/canvas/document/types';
import { angleDegrees, magnitude } from '@/canvas/network/phasor';
import { readNetwork } from '@/canvas/network/readings';
import { anySheet } from '../../support/arbitrary-sheets';
import { dividerSheet, ladderSheet } from '../../support/sample-sheets';
import { SheetBuilder } from '../../support/sheet-builder';

function withValues(sheet: SheetDocument, id: string, values: Readonly<Record<string, string>>): SheetDocument {
  return { ...sheet, parts: sheet.parts.map((part) => (part.id === id ? { ...part, values: { ...part.values, ...values } } : part)) };
}

describe('the readings of a sheet', () => {
  it('are those of the network: a divider of two equal resistors', () => {
    const { parts, nodes, problems, deadSources } = readNetwork(dividerSheet());
    expect(problems).toEqual([]);
    expect(deadSources).toEqual([]);
    expect(nodes.get('out')).toEqual({ re: 0.5, im: 0 });
    const current = parts.get('resistor-1')?.current;
    expect(current?.re).toBeCloseTo(0.5e-3, 18);
    // Positive current enters the first pin, so the source's own is negative, and so is the power that it absorbs.
    expect(parts.get('voltageSource-1')?.current?.re).toBeCloseTo(-0.5e-3, 18);
    expect(parts.get('voltageSource-1')?.power?.re).toBeCloseTo(-0.5e-3, 18);
    expect(parts.get('resistor-2')?.power?.re).toBeCloseTo(0.25e-3, 18);
  });

  it('change their sign with a part that is turned about', () => {
    const sheet = dividerSheet();
    const turned = { ...sheet, parts: sheet.parts.map((part) => (part.id === 'resistor-2' ? { ...part, turn: 270 as const } : part)) };
    const rewired = {
      ...turned,
      wires: turned.wires.map((wire) => ({
        ...wire,
        from: wire.from.part === 'resistor-2' ? { part: 'resistor-2', pin: 'a' } : wire.from,
        to: wire.to.part === 'resistor-2' ? { part: 'resistor-2', pin: 'b' } : wire.to,
      })),
    };
    expect(readNetwork(rewired).parts.get('resistor-2')?.current?.re).toBeCloseTo(-0.5e-3, 18);
    expect(readNetwork(rewired).nodes.get('out')).toEqual({ re: 0.5, im: 0 });
  });

  it('balance: the power of all parts adds up to nothing', () => {
    const { balance } = readNetwork(ladderSheet(60));
    expect(balance?.holds).toBe(true);
    expect(balance?.ratio).toBeLessThan(60 * Number.EPSILON);
  });

  it('take the amplitude for the direct value at 0 Hz, whether that is the source’s own frequency or the operating one', () => {
    const values = { amplitude: '10', measure: 'peak', wave: 'sine', phase: '30' };
    const own = readNetwork({ ...withValues(dividerSheet(), 'voltageSource-1', { ...values, frequency: '0 Hz' }), operatingFrequency: '0 Hz' });
    const following = readNetwork({ ...withValues(dividerSheet(), 'voltageSource-1', values), operatingFrequency: '0 Hz' });
    expect(own.parts.get('voltageSource-1')?.voltage).toEqual({ re: 10, im: 0 });
    expect(following.parts.get('voltageSource-1')?.voltage).toEqual({ re: 10, im: 0 });
    expect(following.deadSources).toEqual([]);
  });

  it('are withheld while the operating frequency cannot be read, and the reason is said', () => {
    const { parts, nodes, problems } = readNetwork({ ...dividerSheet(), operatingFrequency: 'often' });
    expect([parts.size, nodes.size]).toEqual([0, 0]);
    expect(problems[0]?.message).toMatch(/^Operating frequency: /);
  });

  it('of a network at rest balance too', () => {
    const { balance, problems } = readNetwork(withValues(dividerSheet(), 'voltageSource-1', { amplitude: '0' }));
    expect(balance).toEqual({ ratio: 0, holds: true });
    expect(problems).toEqual([]);
  });

  it('are those at the operating frequency, in hertz or radians a second', () => {
    const at = (operatingFrequency: string) => readNetwork({ ...dividerSheet(), operatingFrequency }).frequencyHz;
    expect(at('2 kHz')).toBe(2000);
    expect(at('314.1592653589793 rad/s')).toBeCloseTo(50, 12);
    const sheet = new SheetBuilder();
    const source = sheet.part('voltageSource', 0, 0, { turn: 90 });
    const resistor = sheet.resistor(100, -100, '1k');
    const capacitor = sheet.capacitor(200, 0, '1u', 90);
    sheet.wire(source, resistor);
    sheet.wire([resistor, 'b'], capacitor);
    sheet.wire([capacitor, 'b'], [source, 'b']);
    sheet.wire([source, 'b'], sheet.reference(0, 100));
    // At 1 krad/s, R = 1/(ωC): the current leads by 45° and is 1/√2 mA.
    const current = readNetwork(sheet.document({ operatingFrequency: '1000 rad/s' })).parts.get(resistor)?.current;
    expect(magnitude(current ?? { re: 0, im: 0 })).toBeCloseTo(1e-3 / Math.SQRT2, 15);
    expect(angleDegrees(current ?? { re: 0, im: 0 })).toBeCloseTo(45, 12);
  });

  it('leave out a source of another frequency, and say so', () => {
    const sheet = withValues(dividerSheet(), 'voltageSource-1', { frequency: '50 Hz' });
    const at1kHz = readNetwork(sheet);
    expect(at1kHz.deadSources).toEqual(['voltageSource-1']);
    expect(at1kHz.nodes.get('out')).toEqual({ re: 0, im: 0 });
    const at50Hz = readNetwork({ ...sheet, operatingFrequency: '50' });
    expect(at50Hz.deadSources).toEqual([]);
    expect(at50Hz.nodes.get('out')).toEqual({ re: 0.5, im: 0 });
  });

  it('take a source as live whose frequency differs by rounding alone', () => {
    // 2π·10 krad/s comes back as 9999.999999999998 Hz.
    const sheet = withValues(dividerSheet({ operatingFrequency: '10 kHz' }), 'voltageSource-1', { frequency: '62.83185307179586 krad/s' });
    expect(readNetwork(sheet).deadSources).toEqual([]);
    expect(readNetwork(sheet).nodes.get('out')).toEqual({ re: 0.5, im: 0 });
  });
});

describe('what is wrong with a sheet', () => {
  it('withholds every figure while a value cannot be read, and marks the part', () => {
    const readings = readNetwork(withValues(dividerSheet(), 'resistor-1', { resistance: 'some' }));
    expect(readings.parts.size).toBe(0);
    expect(readings.nodes.size).toBe(0);
    expect(readings.balance).toBeNull();
    expect(readings.problems).toHaveLength(1);
    expect(readings.problems[0]).toMatchObject({ parts: ['resistor-1'], message: expect.stringMatching(/^R1: /) });
  });

  it('names an operating frequency that cannot be read', () => {
    const { problems } = readNetwork(dividerSheet({ operatingFrequency: 'fast' }));
    expect(problems[0]?.message).toMatch(/^Operating frequency: /);
  });

  it('leads from the solver to the parts, pins and wires of the drawing', () => {
    const sheet = new SheetBuilder();
    const [first, second] = [sheet.part('voltageSource', 0, 0, { turn: 90 }), sheet.part('voltageSource', 100, 0, { turn: 90, values: { amplitude: '2' } })];
    const wires = [sheet.wire(first, second), sheet.wire([first, 'b'], [second, 'b'])];
    sheet.wire([first, 'b'], sheet.reference(0, 100));
    const { problems } = readNetwork(sheet.document());
    expect(problems).toHaveLength(1);
    expect([...(problems[0]?.parts ?? [])].sort()).toEqual([first, second]);
    expect(problems[0]?.message).toMatch(/VS1.*VS2/);
    for (const wire of problems[0]?.wires ?? []) expect([...wires, 'wire-3']).toContain(wire);
  });

  it('still reads what can be solved beside what cannot', () => {
    const sheet = new SheetBuilder();
    const source = sheet.part('voltageSource', 0, 0, { turn: 90 });
    const load = sheet.resistor(100, 0, '1k', 90);
    sheet.wire(source, load);
    sheet.wire([source, 'b'], [load, 'b']);
    sheet.wire([load, 'b'], sheet.reference(100, 100));
    const loose = sheet.part('currentSource', 600, 0);
    const readings = readNetwork(sheet.document());
    expect(readings.problems.some(({ parts }) => parts.includes(loose))).toBe(true);
    expect(readings.problems.every(({ parts }) => !parts.includes(load))).toBe(true);
    expect(readings.parts.get(load)?.current?.re).toBeCloseTo(1e-3, 18);
  });

  it('is a name that has no effect, which is said', () => {
    const sheet = dividerSheet();
    const named = { ...sheet, parts: sheet.parts.map((part) => (part.kind === 'nodeName' ? { ...part, at: { x: 460, y: 440 } } : part)) };
    const { problems, nodes } = readNetwork(named);
    expect(problems).toHaveLength(1);
    expect(problems[0]).toMatchObject({ parts: ['nodeName-1'], message: expect.stringContaining('out is the reference node') });
    expect(nodes.size).toBeGreaterThan(0);
  });

  it('is nothing on an empty sheet', () => {
    expect(readNetwork(new SheetBuilder().document())).toMatchObject({ problems: [], cautions: [], balance: null });
  });

  it('is always words about parts that are there, never an exception or a figure that is no number', () => {
    fc.assert(
      fc.property(anySheet(), fc.constantFrom('1 kHz', '0', '50'), (sheet, operatingFrequency) => {
        const readings = readNetwork({ ...sheet, operatingFrequency });
        const ids = new Set(sheet.parts.map(({ id }) => id));
        for (const { message, parts } of readings.problems) {
          expect(message).toMatch(/^[^]{10,}\.$/);
          expect(message).not.toMatch(/NaN|undefined|\[object/);
          for (const part of parts) expect(ids.has(part)).toBe(true);
        }
        for (const { current, voltage, power } of readings.parts.values()) {
          for (const phasor of [current, voltage, power]) {
            if (phasor) expect(Number.isFinite(phasor.re) && Number.isFinite(phasor.im)).toBe(true);
          }
        }
        if (readings.balance) expect(readings.balance.holds).toBe(true);
      }),
      { numRuns: 300 },
    );
  });
});
