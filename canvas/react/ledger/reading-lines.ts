import { formatAngle, formatQuantity, type Unit } from '@/solver';
import { amplitudeFactor, formatReading, withoutRounding, type ReadingConvention } from '../../network/format-reading';
import { angleDegrees, magnitude, type Phasor } from '../../network/phasor';
import type { ReadingQuantity, ReadingRow } from '../../network/reading-rows';

/** A line of the table ready to be set: only strings and numbers, so that a line that did not change is not drawn again. */
export type ReadingLine = {
  readonly id: string;
  readonly name: string;
  readonly degrees: number;
  /** Size relative to the largest of its kind on the sheet; null where it is not determined. */
  readonly length: number | null;
  readonly first: string;
  /** Null where the first figure is all there is. */
  readonly second: string | null;
};

const UNITS: Readonly<Record<ReadingQuantity, Unit>> = { current: 'A', voltage: 'V', power: 'VA', node: 'V' };
const DIGITS = 3;

/**
 * @param rows the lines to be shown, in order.
 * @param all every line of the kind, which the dials' sizes are relative to.
 */
export function linesOf(
  rows: readonly ReadingRow[],
  all: readonly ReadingRow[],
  quantity: ReadingQuantity,
  convention: ReadingConvention,
): readonly ReadingLine[] {
  let largest = 0;
  for (const { phasor } of all) if (phasor) largest = Math.max(largest, magnitude(phasor));
  return rows.map(({ id, name, phasor }) => {
    if (!phasor) return { id, name, degrees: 0, length: null, first: '\u2014', second: null };
    const [first, second] = figuresText(phasor, quantity, convention);
    return {
      id,
      name: quantity === 'node' && name === '0' ? '0 (reference)' : name,
      // A tenth of a degree cannot be seen in the dial.
      degrees: Math.round(angleDegrees(phasor)),
      length: relativeSize(magnitude(phasor), largest),
      first,
      second,
    };
  });
}

/** Rounded, so that a change too small to be seen draws nothing; but only a reading of zero has no hand at all. */
function relativeSize(size: number, largest: number): number {
  if (size === 0) return 0;
  return Math.max(0.02, Math.round((size / largest) * 50) / 50);
}

function figuresText(phasor: Phasor, quantity: ReadingQuantity, convention: ReadingConvention): readonly [string, string | null] {
  const unit = UNITS[quantity];
  if (quantity === 'power') {
    const { re, im } = withoutRounding(phasor);
    return [formatQuantity(re, 'W', DIGITS), convention === 'direct' ? null : formatQuantity(im, 'var', DIGITS)];
  }
  if (convention === 'direct' || convention.form === 'rectangular') return [formatReading(phasor, unit, convention, DIGITS), null];
  const size = magnitude(phasor);
  if (size === 0) return [formatQuantity(0, unit, DIGITS), ''];
  return [
    formatQuantity(size * amplitudeFactor(unit, convention), unit, DIGITS),
    `∠ ${formatAngle(angleDegrees(phasor), 1)}`,
  ];
}
