import { formatQuantity, parseQuantity, type Unit } from '@/solver';
import type { FieldDefinition } from '../../parts/definition';
import { readAngle, readFrequency, TWO_PI } from '../../parts/read-values';

/** The digits of the shortest text that reads back as the same number: 1 for 200, 2 for 4.7. */
function shortestDigits(value: number): number {
  const [mantissa = ''] = Math.abs(value).toExponential().split('e');
  return mantissa.replace('.', '').length;
}

/** A quantity with all its digits, and no fewer than `least`: 60m is set as 60.0 mH, 1.22314µ in full. */
export function formatWhole(value: number, unit: Unit, least: number): string {
  return formatQuantity(value, unit, Math.max(least, shortestDigits(value)));
}

/** A frequency in hertz, to four digits as everywhere. */
export function formatHertz(hz: number): string {
  return formatQuantity(hz, 'Hz', 4);
}

/** The angular frequency that belongs to a frequency in hertz. */
export function formatAngular(hz: number): string {
  return formatQuantity(hz * TWO_PI, 'rad/s', 4);
}

/** What was understood of a typed frequency, in the other unit as well; empty where it is not understood. */
export function echoFrequency(text: string): string {
  const read = readFrequency(text);
  if (!read.ok) return '';
  if (/rad|s⁻¹|\/\s*s/i.test(text)) return formatHertz(read.value);
  return formatWhole(read.value, 'Hz', 4);
}

/** What was understood of the text of a part's field, to stand beside it; empty where there is nothing to say. */
export function echoField(field: FieldDefinition, text: string): string {
  switch (field.type) {
    case 'quantity': {
      const read = parseQuantity(text, field.unit);
      return read.ok ? formatWhole(read.value, field.unit, 3) : '';
    }
    case 'angle': {
      const read = readAngle(text);
      if (!read.ok) return '';
      // Radians come out with digits that nobody typed.
      return /rad\s*$/i.test(text) ? formatQuantity(read.value, '°', 4) : formatWhole(read.value, '°', 1);
    }
    case 'frequency':
      return text.trim() === '' ? '' : echoFrequency(text);
    case 'choice':
    case 'nodeName':
      return '';
  }
}
