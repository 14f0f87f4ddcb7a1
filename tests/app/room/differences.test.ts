import { describe, expect, it } from 'vitest';
import { differences } from '@/app/sheets/[id]/_room/conflict/differences';
import { emptySheetDocument } from '@/canvas/document/schema';
import type { Part, SheetDocument } from '@/canvas/document/types';
import { initialValues, type PartKind } from '@/canvas/parts/registry';

function part(id: string, kind: PartKind, designator: string, values: Record<string, string> = {}): Part {
  return { id, kind, designator, at: { x: 0, y: 0 }, turn: 0, mirrored: false, values: { ...initialValues(kind), ...values } };
}

const sheet = (over: Partial<SheetDocument>): SheetDocument => ({ ...emptySheetDocument(), ...over });

describe('differences of two versions of a sheet', () => {
  it('are none between equal ones', () => {
    const one = sheet({ parts: [part('a', 'resistor', 'R1')] });
    expect(differences(one, structuredClone(one))).toEqual([]);
  });

  it('name parts by designator: changed values, parts only in one', () => {
    const mine = sheet({
      parts: [part('a', 'resistor', 'R1', { resistance: '4k7' }), part('b', 'capacitor', 'C1', { capacitance: '100n' })],
    });
    const theirs = sheet({
      parts: [part('a', 'resistor', 'R1', { resistance: '10k' }), part('c', 'inductor', 'L1', { inductance: '60m' })],
    });
    expect(differences(mine, theirs).map(({ what, mine: m, theirs: t }) => [what, m, t])).toEqual([
      ['R1', '4.70\u2009kΩ', '10.0\u2009kΩ'],
      ['C1', '100\u2009nF', '—'],
      ['L1', '—', '60.0\u2009mH'],
    ]);
  });

  it('count what was only moved, and see connections whichever way they were drawn', () => {
    const a = part('a', 'resistor', 'R1');
    const b = part('b', 'resistor', 'R2');
    const wire = { id: 'w', from: { part: 'a', pin: 'b' }, to: { part: 'b', pin: 'a' }, corners: [] };
    const mine = sheet({ parts: [a, b], wires: [wire] });
    const redrawn = sheet({ parts: [{ ...a, at: { x: 50, y: 0 } }, b], wires: [{ ...wire, id: 'v', from: wire.to, to: wire.from }] });
    expect(differences(mine, redrawn)).toEqual([{ what: 'Lying elsewhere', mine: '1 part', theirs: '1 part' }]);
    expect(differences(mine, { ...mine, wires: [] })).toEqual([{ what: 'Connections only here', mine: '1', theirs: '—' }]);
  });

  it('hold what belongs to the whole sheet', () => {
    const changed = sheet({ operatingFrequency: '2 kHz', purpose: 'A filter', convention: { amplitude: 'peak', form: 'polar' } });
    expect(differences(sheet({}), changed).map(({ what }) => what)).toEqual(['Operating frequency', 'Convention', 'Purpose']);
  });
});
