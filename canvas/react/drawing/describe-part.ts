import type { Part } from '../../document/types';
import { conventionAt, formatPower, formatReading } from '../../network/format-reading';
import { marksOf } from '../../network/marks';
import { definitionOf } from '../../parts/registry';
import type { SheetState } from '../../store/sheet-store';

/** A part as it is read aloud: what it is, its value, its readings, and what is wrong with it. */
export function describePart(part: Part, { document, readings }: Pick<SheetState, 'document' | 'readings'>): string {
  const definition = definitionOf(part.kind);
  const words = [`${definition.name} ${part.designator}`.trim()];
  const value = definition.describe(part.values).replaceAll('\n', ', ');
  if (value !== '') words.push(value);
  const convention = conventionAt(document.convention, readings.frequencyHz);
  const reading = readings.parts.get(part.id);
  if (reading?.current) words.push(`current ${formatReading(reading.current, 'A', convention)}`);
  if (reading?.voltage) words.push(`voltage ${formatReading(reading.voltage, 'V', convention)}`);
  if (reading?.power) words.push(`power ${formatPower(reading.power, convention)}`);
  if (part.kind === 'nodeName') {
    const node = readings.network.nodes.byPin.get(`${part.id}/a`);
    const voltage = node && readings.nodes.get(node.name);
    if (voltage) words.push(`voltage ${formatReading(voltage, 'V', convention)}`);
  }
  const marks = marksOf(readings);
  if (marks.dead.has(part.id)) words.push('dead at this frequency');
  const fault = marks.faultyParts.get(part.id);
  if (fault !== undefined) words.push(`at fault: ${fault}`);
  const caution = marks.cautions.get(part.id);
  if (caution !== undefined) words.push(`caution: ${caution}`);
  return words.join(', ');
}
