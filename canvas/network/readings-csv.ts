import { formatFull, type Unit } from '@/solver';
import type { SheetDocument } from '../document/types';
import { amplitudeFactor, conventionAt } from './format-reading';
import { angleDegrees, magnitude, scaled } from './phasor';
import { filterRows, orderRows, READING_QUANTITIES, readingRows, type ReadingQuantity, type ReadingRow } from './reading-rows';
import type { Readings } from './readings';

const COLUMNS = [
  'kind',
  'name',
  'quantity',
  'real',
  'imaginary',
  'magnitude',
  'angle_deg',
  'unit',
  'convention',
  'frequency_Hz',
] as const;

const UNITS: Readonly<Record<ReadingQuantity, Unit>> = { current: 'A', voltage: 'V', power: 'VA', node: 'V' };

/** What each line's quantity is called; a node's is its voltage over the reference node. */
const QUANTITY_WORDS: Readonly<Record<ReadingQuantity, string>> = {
  current: 'current',
  voltage: 'voltage',
  power: 'complex power',
  node: 'voltage',
};

/**
 * All readings as comma-separated values (RFC 4180: lines end with CR LF), every digit, decimal point, a line for
 * each quantity of each part and each node's voltage. Voltages and currents are in the sheet's convention; a power is
 * that of rms phasors always. What is not determined has empty figures.
 *
 * @param filter only parts and nodes whose name holds this text.
 */
export function readingsCsv(document: SheetDocument, readings: Readings, filter = ''): string {
  const lines = READING_QUANTITIES.flatMap((quantity) => {
    const rows = filterRows(readingRows(document, readings, quantity), filter);
    const convention = conventionAt(document.convention, readings.frequencyHz);
    return orderRows(rows, { by: 'name', descending: false }, quantity, convention).map((row) =>
      line(row, quantity, document, readings),
    );
  });
  return [COLUMNS.join(','), ...lines].join('\r\n') + '\r\n';
}

function line(row: ReadingRow, quantity: ReadingQuantity, document: SheetDocument, readings: Readings): string {
  const { frequencyHz } = readings;
  const convention = conventionAt(document.convention, frequencyHz);
  const unit = UNITS[quantity];
  const phasor = row.phasor && scaled(row.phasor, amplitudeFactor(unit, convention));
  const amplitude = convention === 'direct' ? 'direct' : quantity === 'power' ? 'rms' : convention.amplitude;
  return [
    quantity === 'node' ? 'node' : 'part',
    textCell(row.name),
    QUANTITY_WORDS[quantity],
    phasor ? formatFull(phasor.re) : '',
    phasor ? formatFull(phasor.im) : '',
    phasor ? formatFull(magnitude(phasor)) : '',
    phasor ? formatFull(angleDegrees(phasor)) : '',
    unit,
    amplitude,
    formatFull(frequencyHz),
  ].join(',');
}

/**
 * A name as a cell. A spreadsheet takes a text that begins with one of these signs for a formula and runs it; an
 * apostrophe in front makes it text (the attack is known as CSV injection).
 */
function textCell(text: string): string {
  const harmless = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(harmless) ? `"${harmless.replace(/"/g, '""')}"` : harmless;
}
