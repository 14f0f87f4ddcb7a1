// @ts-check
import { table } from './report.mjs';

/** @typedef {{ readonly area: string, readonly name: string, readonly value: number, readonly unit: string }} Figure */

/**
 * The figure in a line that a bench printed, or null when the line is something else.
 *
 * @param {string} line
 * @returns {Figure | null}
 */
export function figureIn(line) {
  if (!line.startsWith('{')) return null;
  try {
    const { area, name, value, unit } = JSON.parse(line);
    const texts = [area, name, unit].every((text) => typeof text === 'string');
    return texts && typeof value === 'number' && Number.isFinite(value) ? { area, name, value, unit } : null;
  } catch {
    return null;
  }
}

/**
 * @param {readonly Figure[]} figures
 * @returns {readonly string[]}
 */
export function figureTable(figures) {
  const rounded = (/** @type {number} */ value) => String(Number(value.toPrecision(4)));
  return table([
    ['figure', 'value', 'unit'],
    ...figures.map(({ area, name, value, unit }) => [`${area} ${name}`, rounded(value), unit]),
  ]);
}
