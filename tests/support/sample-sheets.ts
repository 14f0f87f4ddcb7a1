import type { SheetDocument } from '@/canvas/document/types';
import { SheetBuilder } from './sheet-builder';

const RAIL_TOP = 200;
const RAIL_BOTTOM = 440;
const MIDDLE = (RAIL_TOP + RAIL_BOTTOM) / 2;
const PITCH = 280;

/**
 * A long low-pass ladder, well laid out, of exactly `parts` parts that the solver counts: a 1 V source with 620 Ω, then
 * sections of an inductor with its winding resistance and a capacitor, and 620 Ω at the end. Its characteristic
 * impedance √(L/C) is 600 Ω and its cut-off 1/(π√(LC)) 5.3 kHz, so that a signal at 1 kHz passes and every part has a
 * reading worth showing. Every fifth node carries a name.
 *
 * @param parts at least 6: source, two ends, one section
 */
export function ladderSheet(parts: number): SheetDocument {
  if (!Number.isInteger(parts) || parts < 6) throw new Error('a ladder has a source, two ends and at least one section');
  const sheet = new SheetBuilder();
  const source = sheet.part('voltageSource', 200, MIDDLE, { turn: 90 });
  const end = sheet.resistor(330, RAIL_TOP, '620');
  sheet.wire(source, end);
  let top: readonly [string, string] = [end, 'b'];
  let bottom: readonly [string, string] = [source, 'b'];
  let x = 460;
  const join = (nextTop: string, nextBottom: string) => {
    sheet.wire(top, nextTop);
    sheet.wire(bottom, nextBottom);
    top = [nextTop, 'a'];
    bottom = [nextBottom, 'a'];
  };
  const shunt = (make: (x: number) => string) => {
    const [above, below] = [sheet.junction(x, RAIL_TOP), sheet.junction(x, RAIL_BOTTOM)];
    join(above, below);
    const part = make(x);
    sheet.wire(above, part);
    sheet.wire([part, 'b'], below);
    return below;
  };
  const capacitor = (at: number) => sheet.capacitor(at, MIDDLE, '100n', 90);

  const first = shunt(capacitor);
  sheet.wire(first, sheet.reference(x, RAIL_BOTTOM + 20));
  // One part is left over for the far end, and what does not fill a section of three becomes capacitors beside it.
  let left = parts - 4;
  let section = 1;
  for (; left >= 3; left -= 3, section += 1) {
    const coil = sheet.inductor(x + 90, RAIL_TOP, '36m');
    const winding = sheet.resistor(x + 190, RAIL_TOP, '3.3');
    sheet.wire(top, coil);
    sheet.wire([coil, 'b'], winding);
    top = [winding, 'b'];
    x += PITCH;
    shunt(capacitor);
    if (section % 5 === 0) sheet.name(x, RAIL_TOP, `n${section}`);
  }
  for (; left > 0; left -= 1) {
    x += PITCH / 2;
    shunt((at) => sheet.capacitor(at, MIDDLE, '1n', 90));
  }
  x += PITCH / 2;
  const load = sheet.resistor(x, MIDDLE, '620', 90);
  sheet.wire(top, load);
  sheet.wire(bottom, [load, 'b']);
  return sheet.document({ operatingFrequency: '1 kHz', band: { fromHz: 100, toHz: 100_000 } });
}

/** A divider of two resistors: the smallest sheet that has everything. Out is half of the source. */
export function dividerSheet(change: Partial<SheetDocument> = {}): SheetDocument {
  const sheet = new SheetBuilder();
  const source = sheet.part('voltageSource', 200, MIDDLE, { turn: 90 });
  const upper = sheet.resistor(330, RAIL_TOP, '1k');
  const out = sheet.junction(460, RAIL_TOP);
  const lower = sheet.resistor(460, MIDDLE, '1k', 90);
  const rail = sheet.junction(460, RAIL_BOTTOM);
  sheet.name(460, RAIL_TOP, 'out');
  sheet.wire(source, upper);
  sheet.wire([upper, 'b'], out);
  sheet.wire(out, lower);
  sheet.wire([lower, 'b'], rail);
  sheet.wire([source, 'b'], rail);
  sheet.wire(rail, sheet.reference(460, RAIL_BOTTOM + 20));
  return sheet.document(change);
}
