import { formatQuantity, parseQuantity } from '@/solver';
import type { FieldDefinition } from '../../parts/definition';
import { readAngle, readFrequency } from '../../parts/read-values';

/** What was understood of a field's text, set in full; the text itself where there is nothing to understand. */
export function echoOf(field: FieldDefinition, text: string): string {
  switch (field.type) {
    case 'quantity': {
      const read = parseQuantity(text, field.unit);
      return read.ok ? read.echo : text;
    }
    case 'frequency': {
      if (text.trim() === '') return 'the operating frequency';
      const read = readFrequency(text);
      return read.ok ? formatQuantity(read.value, 'Hz', 6) : text;
    }
    case 'angle': {
      const read = readAngle(text);
      return read.ok ? formatQuantity(read.value, '°', 6) : text;
    }
    case 'choice':
      return field.options.find(({ value }) => value === text)?.label ?? text;
    case 'nodeName':
      return text.trim();
  }
}
