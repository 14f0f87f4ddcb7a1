import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { capacitor, inductor, resistor, voltageSource } from '../solver/support/networks';
import { CAPACITOR_EXAMPLES, CORRECTED, KILOVAR_EXAMPLES, KILOVARS, TABLE_WITHIN } from './data/power-factor';
import { expectPrinted } from './support/expect-figure';
import { bySolver, magnitude } from './support/measure';

/** Loads with and without the capacitor that corrects them, solved. */
interface Load {
  readonly volts: number;
  readonly frequency: number;
  readonly watts: number;
  readonly reactive: number;
}

function loadOf({ volts, frequency, watts, reactive }: Load): readonly Element[] {
  return [
    voltageSource('V1', '1', '0', volts),
    resistor('R1', '1', '0', volts ** 2 / watts),
    inductor('L1', '1', '0', volts ** 2 / (2 * Math.PI * frequency * reactive)),
  ];
}

/** The capacitance that takes a load to a power factor, and the vars that it has by the solver; the factor is checked. */
function correct(load: Load, after: number): { readonly farads: number; readonly vars: number } {
  const wanted = load.watts * Math.tan(Math.acos(after));
  const farads = (load.reactive - wanted) / (2 * Math.PI * load.frequency * load.volts ** 2);
  const solution = bySolver([...loadOf(load), capacitor('C1', '1', '0', farads)], load.frequency);
  const supplied = solution.power('V1');
  expect(Math.abs(-supplied.re / magnitude(supplied) - after)).toBeLessThanOrEqual(16 * Number.EPSILON);
  return { farads, vars: -solution.power('C1').im };
}

/** Kilovars per kilowatt. */
function multiplier(before: number, after: number): number {
  const load = { volts: 230, frequency: 50, watts: 1000, reactive: 1000 * Math.tan(Math.acos(before)) };
  return correct(load, after).vars / 1000;
}

describe('power factor correction', () => {
  it.each(Object.entries(KILOVARS))('from a power factor of %s, the table’s row', (before, row) => {
    CORRECTED.forEach((after, k) => {
      expectPrinted(multiplier(Number(before), after), { printed: String(row[k]), within: TABLE_WITHIN });
    });
  });

  it.each(KILOVAR_EXAMPLES)('$source: $kilowatts kW from $before to $after take $printed kvar', (example) => {
    const kilovars = example.kilowatts * multiplier(example.before, example.after);
    expectPrinted(kilovars, example);
    expectPrinted(kilovars, { printed: example.computed });
  });

  it.each(CAPACITOR_EXAMPLES)('$source takes $computed F', ({ after, kilovars, printed, computed, ...load }) => {
    const { farads, vars } = correct(load, after);
    if (printed !== undefined) expectPrinted(farads, { printed });
    expectPrinted(farads, { printed: computed });
    if (kilovars !== undefined) expectPrinted(vars / 1000, { printed: kilovars });
  });

  // Kuphaldt, Lessons In Electric Circuits, vol. II AC, ch. 11 [found; the figures with 80 µF computed].
  it('leaves a load of 1.5 kW with 80 µF beside it 16.519 var', () => {
    const load = { volts: 240, frequency: 60, watts: 1500, reactive: Math.sqrt((240 * 9.615) ** 2 - 1500 ** 2) };
    const bare = bySolver(loadOf(load), 60);
    expectPrinted(magnitude(bare.current('V1')), { printed: '9.615' });
    expectPrinted(magnitude(bare.power('V1')), { printed: '2308' });
    expectPrinted(bare.power('L1').im, { printed: '1754' });
    expectPrinted(bare.power('L1').im, { printed: '1753.57' });
    expectPrinted(-bare.power('V1').re / magnitude(bare.power('V1')), { printed: '0.65' });
    const corrected = bySolver([...loadOf(load), capacitor('C1', '1', '0', 80e-6)], 60);
    expectPrinted(-corrected.power('C1').im, { printed: '1737' });
    expectPrinted(magnitude(corrected.power('V1')), { printed: '1500.09' });
  });
});
