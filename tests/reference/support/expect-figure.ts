import { expect } from 'vitest';
import type { ComplexLike } from '../../solver/support/expect';
import { degrees, difference, magnitude } from './measure';
import type { PhasorFigure, Printed } from './records';

/** Half a unit of the last digit of a number as printed. */
function halfUnit(text: string): number {
  const [mantissa = '', power = '0'] = text.split('e');
  const decimals = (mantissa.split('.')[1] ?? '').length;
  return 0.5 * 10 ** (Number(power) - decimals);
}

/** The value is the number printed, to half a unit of its last digit, or to the tolerance beside it. */
export function expectPrinted(value: number, { printed, within = halfUnit(printed) }: Printed): void {
  // Half a unit in decimals is not exactly so in binary.
  expect(Math.abs(value - Number(printed)), `${value} against ${printed}`).toBeLessThanOrEqual(within * (1 + 1e-9));
}

/** The angle is the one printed, the short way round: −180° is 180°. */
export function expectAngle(value: number, printed: Printed): void {
  expectPrinted(value - 360 * Math.round((value - Number(printed.printed)) / 360), printed);
}

/** The phasor is as calculated to six digits of its size, and as printed. */
export function expectPhasor(value: ComplexLike, { printed, computed }: PhasorFigure): void {
  expect(magnitude(difference(value, computed)), 'off the calculated one').toBeLessThanOrEqual(
    1e-5 * magnitude(computed),
  );
  if ('re' in printed) {
    expect(Math.abs(value.re - printed.re), 're').toBeLessThanOrEqual(printed.within);
    expect(Math.abs(value.im - printed.im), 'im').toBeLessThanOrEqual(printed.within);
    return;
  }
  expect(Math.abs(magnitude(value) - printed.magnitude), 'magnitude').toBeLessThanOrEqual(printed.within);
  if (printed.degrees === undefined) return;
  const turned = degrees(value) - printed.degrees;
  expect(Math.abs(turned - 360 * Math.round(turned / 360)), 'degrees').toBeLessThanOrEqual(printed.withinDegrees ?? 0);
}
