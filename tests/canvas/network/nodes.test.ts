import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { allPins, pinKey } from '@/canvas/document/lookup';
import { buildNetwork } from '@/canvas/network/network';
import { findNodes } from '@/canvas/network/nodes';
import { anySheet } from '../../support/arbitrary-sheets';
import { nodePartition } from '../../support/partition';
import { dividerSheet } from '../../support/sample-sheets';
import { SheetBuilder } from '../../support/sheet-builder';

describe('the nodes of a drawing', () => {
  it('are joined by a wire', () => {
    const sheet = new SheetBuilder();
    const [a, b] = [sheet.resistor(0, 0, '1'), sheet.resistor(200, 0, '1')];
    sheet.wire([a, 'b'], b);
    expect(nodePartition(sheet.document())).toEqual(['resistor-1/a', 'resistor-1/b resistor-2/a', 'resistor-2/b']);
  });

  it('are not joined where wires cross', () => {
    const sheet = new SheetBuilder();
    const [left, right] = [sheet.junction(0, 100), sheet.junction(200, 100)];
    const [above, below] = [sheet.junction(100, 0), sheet.junction(100, 200)];
    sheet.wire(left, right);
    sheet.wire(above, below);
    expect(nodePartition(sheet.document())).toHaveLength(2);
  });

  it('are not joined where a wire runs over a pin', () => {
    const sheet = new SheetBuilder();
    const [left, right] = [sheet.junction(0, 0), sheet.junction(200, 0)];
    sheet.wire(left, right);
    sheet.resistor(100, 30, '1', 90);
    expect(nodePartition(sheet.document())).toContain('resistor-1/a');
  });

  it('are joined where pins lie on one another, and there only', () => {
    const sheet = new SheetBuilder();
    sheet.resistor(0, 0, '1');
    sheet.resistor(60, 0, '1');
    sheet.resistor(130, 0, '1');
    expect(nodePartition(sheet.document())).toEqual(['resistor-1/a', 'resistor-1/b resistor-2/a', 'resistor-2/b', 'resistor-3/a', 'resistor-3/b']);
  });

  it('of the same name are one, however far apart', () => {
    const sheet = new SheetBuilder();
    sheet.name(0, 0, 'out');
    sheet.name(900, 0, 'out');
    sheet.name(0, 900, 'Out');
    const nodes = findNodes(sheet.document());
    expect(nodes.all.map(({ name, named }) => [name, named])).toEqual([
      ['out', true],
      ['Out', true],
    ]);
  });

  it('with a reference mark are one, however many marks there are, and are called 0', () => {
    const sheet = new SheetBuilder();
    for (const x of [0, 500, 900]) sheet.reference(x, 0);
    const nodes = findNodes(sheet.document());
    expect(nodes.all).toHaveLength(1);
    expect(nodes.all[0]).toMatchObject({ name: '0', named: false });
  });

  it('keep the first of two names and tell of the second', () => {
    const sheet = new SheetBuilder();
    const [first, second] = [sheet.name(0, 0, 'in'), sheet.name(200, 0, 'source')];
    sheet.wire(first, second);
    expect(findNodes(sheet.document()).alsoCalled).toEqual([{ part: second, name: 'source', instead: 'in' }]);
  });

  it('named on the reference node stay 0 and tell of the name', () => {
    const sheet = new SheetBuilder();
    const [name, reference] = [sheet.name(0, 0, 'earth'), sheet.reference(0, 100)];
    sheet.wire(name, reference);
    expect(findNodes(sheet.document()).alsoCalled).toEqual([{ part: name, name: 'earth', instead: '0' }]);
  });

  it('without a name get numbers that no given name has', () => {
    const sheet = new SheetBuilder();
    sheet.name(0, 0, '1');
    sheet.resistor(300, 0, '1');
    expect(findNodes(sheet.document()).all.map(({ name }) => name)).toEqual(['1', '2', '3']);
  });

  it('have names that JavaScript gives a meaning to like any other', () => {
    const sheet = new SheetBuilder();
    const source = sheet.part('voltageSource', 0, 0, { turn: 90 });
    const load = sheet.resistor(100, 0, '1k', 90);
    for (const [name, pin] of [['__proto__', 'a'], ['constructor', 'b']] as const) {
      sheet.wire([source, pin], [load, pin]);
      sheet.wire([load, pin], sheet.name(300, pin === 'a' ? -30 : 30, name));
    }
    const { list, nodes } = buildNetwork(sheet.document());
    expect(list.elements.map((element) => element.nodes)).toEqual([
      ['__proto__', 'constructor'],
      ['__proto__', 'constructor'],
    ]);
    expect(nodes.byName.get('__proto__')?.pins).toHaveLength(3);
  });

  it('hold every pin once, and every wire, and no two have one name', () => {
    fc.assert(
      fc.property(anySheet(), (sheet) => {
        const nodes = findNodes(sheet);
        const pins = nodes.all.flatMap((node) => node.pins.map(pinKey));
        expect([...pins].sort()).toEqual(allPins(sheet).map(({ ref }) => pinKey(ref)).sort());
        expect(nodes.all.flatMap(({ wires }) => wires).sort()).toEqual(sheet.wires.map(({ id }) => id).sort());
        expect(new Set(nodes.all.map(({ name }) => name)).size).toBe(nodes.all.length);
        for (const wire of sheet.wires) expect(nodes.byPin.get(pinKey(wire.from))).toBe(nodes.byPin.get(pinKey(wire.to)));
      }),
    );
  });

  it('do not depend on the order in which things were drawn', () => {
    fc.assert(
      fc.property(anySheet(), (sheet) => {
        const reversed = { ...sheet, parts: [...sheet.parts].reverse(), wires: [...sheet.wires].reverse() };
        expect(nodePartition(reversed)).toEqual(nodePartition(sheet));
      }),
    );
  });
});

describe('the element list of a drawing', () => {
  it('has each part that is an element, by its designator, with SI values and nodes in the order of its pins', () => {
    expect(buildNetwork(dividerSheet()).list).toEqual({
      version: 1,
      elements: [
        { id: 'VS1', kind: 'voltageSource', nodes: ['1', '0'], value: { rms: 1, phase: 0, frequency: null } },
        { id: 'R1', kind: 'resistor', nodes: ['1', 'out'], resistance: 1000 },
        { id: 'R2', kind: 'resistor', nodes: ['out', '0'], resistance: 1000 },
      ],
    });
  });

  it('has a source as rms on the cosine, however it was given', () => {
    const sheet = new SheetBuilder();
    let row = 0;
    const give = (values: Record<string, string>) => sheet.part('voltageSource', 0, (row += 100), { values });
    give({ amplitude: '10', measure: 'peak', wave: 'sine', phase: '-30', frequency: '' });
    give({ amplitude: '10', measure: 'peakToPeak', wave: 'cosine', phase: '1 rad', frequency: '314.1592653589793 rad/s' });
    give({ amplitude: '-5', measure: 'peak', wave: 'sine', phase: '45', frequency: '0' });
    const values = buildNetwork(sheet.document()).list.elements.map((element) => ('value' in element ? element.value : null));
    expect(values[0]).toEqual({ rms: 10 / Math.SQRT2, phase: -120, frequency: null });
    expect(values[1]?.rms).toBeCloseTo(10 / (2 * Math.SQRT2), 14);
    expect(values[1]?.phase).toBeCloseTo(180 / Math.PI, 12);
    expect(values[1]?.frequency).toBe(50);
    // A direct source has neither peak nor phase.
    expect(values[2]).toEqual({ rms: -5, phase: 0, frequency: 0 });
  });

  it('leaves out what cannot be read, and says which field of which part', () => {
    const sheet = new SheetBuilder();
    const bad = sheet.capacitor(0, 0, 'ten');
    sheet.resistor(0, 100, '1k');
    const { list, unreadable } = buildNetwork(sheet.document());
    expect(list.elements.map(({ id }) => id)).toEqual(['R1']);
    expect(unreadable).toEqual([{ part: bad, field: 'capacitance', message: expect.stringMatching(/\.$/) }]);
  });
});
