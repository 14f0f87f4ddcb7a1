import { describe, expect, it } from 'vitest';
import { selectParts } from '@/canvas/document/selection';
import { emptySheetDocument } from '@/canvas/document/schema';
import { magnitude } from '@/canvas/network/phasor';
import { OpenSheet } from '../../support/open-sheet';
import { dividerSheet } from '../../support/sample-sheets';

const times = (key: string, count: number) => Array.from({ length: count }, () => key);

describe('drawing by keys alone', () => {
  it('a source with a resistor across it, and its current is read', async () => {
    const open = new OpenSheet(emptySheetDocument());
    // The first part goes to the middle of what is in view.
    await open.press('v', 'enter');
    await open.press('r', 't', ...times('shift+arrowright', 2), 'enter');
    await open.press('g', ...times('shift+arrowdown', 2), ...times('shift+arrowleft', 2), 'enter');
    expect(open.document.parts.map(({ designator, kind, at, turn }) => [designator || kind, at.x, at.y, turn])).toEqual([
      ['VS1', 400, 200, 90],
      ['R1', 500, 200, 90],
      ['reference', 400, 300, 0],
    ]);
    // Wires go from pin to pin with Tab, which starts where the cursor is.
    await open.press('escape', 'w', 'tab', 'enter', 'tab', 'tab', 'enter');
    await open.press('w', 'tab', 'enter', 'tab', 'tab', 'tab', 'tab', 'enter');
    expect(open.document.wires).toHaveLength(2);
    const pins = (which: number) => {
      const wire = open.document.wires[which];
      const name = (id: string | undefined) => open.document.parts.find((part) => part.id === id)?.designator;
      return wire && [`${name(wire.from.part)}.${wire.from.pin}`, `${name(wire.to.part)}.${wire.to.pin}`];
    };
    expect(pins(0)).toEqual(['VS1.a', 'R1.a']);
  });

  it('steps through every pin with Tab, and back', async () => {
    const open = new OpenSheet(dividerSheet());
    await open.press('w');
    const visited: (string | undefined)[] = [];
    for (let step = 0; step < 5; step += 1) {
      await open.press('tab');
      visited.push(open.said);
    }
    expect(new Set(visited).size).toBe(5);
    await open.press('shift+tab');
    expect(open.said).toBe(visited[3]);
  });

  it('turns and mirrors the part in hand, and puts it back', async () => {
    const open = new OpenSheet(dividerSheet());
    await open.press('c', 't', 'm', 'enter');
    expect(open.document.parts.at(-1)).toMatchObject({ kind: 'capacitor', turn: 90, mirrored: true, designator: 'C1' });
    await open.press('c', 'escape', 'enter');
    expect(open.document.parts).toHaveLength(dividerSheet().parts.length + 1);
    expect(open.store.getState().tool.kind).toBe('select');
  });

  it('bends a wire with Enter in the open, and takes the bend back with Escape', async () => {
    const open = new OpenSheet(dividerSheet());
    open.store.getState().setCursor({ x: 360, y: 200 });
    await open.press('w', 'enter', ...times('arrowdown', 7), 'enter');
    expect(open.store.getState().tool).toMatchObject({ kind: 'wire', corners: [{ x: 360, y: 270 }] });
    await open.press('escape');
    expect(open.store.getState().tool).toMatchObject({ kind: 'wire', corners: [], from: { kind: 'pin' } });
    await open.press('escape');
    expect(open.store.getState().tool).toMatchObject({ kind: 'wire', from: null });
    await open.press('escape');
    expect(open.store.getState().tool).toEqual({ kind: 'select' });
    expect(open.document).toEqual(dividerSheet());
  });
});

describe('editing by keys', () => {
  it('moves on the grid, one step undone for a row of arrows', async () => {
    const open = new OpenSheet(dividerSheet());
    open.store.getState().select(selectParts(['resistor-1']));
    await open.press('arrowright', 'arrowright', 'shift+arrowdown');
    expect(open.document.parts.find(({ id }) => id === 'resistor-1')?.at).toEqual({ x: 350, y: 250 });
    await open.press('mod+z');
    expect(open.document).toEqual(dividerSheet());
    await open.press('mod+shift+z');
    expect(open.document.parts.find(({ id }) => id === 'resistor-1')?.at).toEqual({ x: 350, y: 250 });
  });

  it('copies, cuts and pastes over the clipboard, and duplicates', async () => {
    const open = new OpenSheet(dividerSheet());
    open.store.getState().select(selectParts(['resistor-1', 'resistor-2']));
    await open.press('mod+c', 'mod+v');
    expect(open.document.parts.map(({ designator }) => designator).filter((designator) => designator.startsWith('R'))).toEqual(['R1', 'R2', 'R3', 'R4']);
    expect([...open.store.getState().selection.parts]).toHaveLength(2);
    await open.press('mod+d');
    expect(open.document.parts).toHaveLength(dividerSheet().parts.length + 4);
    await open.press('mod+x');
    expect(open.document.parts).toHaveLength(dividerSheet().parts.length + 2);
    expect(open.said).toBe('Cut R5 and R6.');
    await open.press('mod+v');
    expect(open.document.parts).toHaveLength(dividerSheet().parts.length + 4);
  });

  it('says so when there is nothing to paste', async () => {
    const open = new OpenSheet(dividerSheet());
    open.clipboard = 'a letter to the editor';
    await open.press('mod+v');
    expect(open.document).toEqual(dividerSheet());
    expect(open.said).toBe('There are no parts on the clipboard to paste.');
  });

  it('opens the editor of the one part that is selected', async () => {
    const open = new OpenSheet(dividerSheet());
    open.store.getState().select(selectParts(['resistor-1']));
    await open.press('enter');
    expect(open.edited).toEqual(['resistor-1']);
  });

  it('deletes, and the readings of what is left are there at once', async () => {
    const open = new OpenSheet(dividerSheet());
    open.store.getState().select(selectParts(['resistor-2']));
    await open.press('delete');
    const { readings } = open.store.getState();
    expect(readings.parts.has('resistor-2')).toBe(false);
    expect(magnitude(readings.nodes.get('out') ?? { re: NaN, im: NaN })).toBeCloseTo(1, 12);
  });
});

describe('the operating frequency by keys', () => {
  it('rises and falls, and comes back to four digits', async () => {
    const open = new OpenSheet(dividerSheet());
    await open.press(']');
    expect(open.document.operatingFrequency).toBe('1.049 kHz');
    await open.press('[');
    expect(open.document.operatingFrequency).toBe('1.000 kHz');
    await open.press('}');
    expect(open.document.operatingFrequency).toBe('1.259 kHz');
  });

  it('keeps to radians a second on a sheet that uses them', async () => {
    const open = new OpenSheet(dividerSheet({ operatingFrequency: '1000 rad/s' }));
    await open.press(']');
    expect(open.document.operatingFrequency).toBe('1.049 krad/s');
  });

  it('is open to those who may only look, as the conventions are', async () => {
    const open = new OpenSheet(dividerSheet(), false);
    await open.press(']', 'p', 'o', 'r', 'delete', 'mod+a', 'delete');
    expect(open.document).toMatchObject({ operatingFrequency: '1.049 kHz', convention: { amplitude: 'peak', form: 'rectangular' } });
    expect(open.document.parts).toEqual(dividerSheet().parts);
  });
});
