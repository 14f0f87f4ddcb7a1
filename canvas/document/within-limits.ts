import { MAX_COORDINATE, MAX_PARTS, MAX_WIRES } from './limits';
import type { SheetDocument } from './types';

/** Why a document cannot be kept, in words, or null: what the schema would refuse at the next save. */
export function limitPassed({ parts, wires }: Pick<SheetDocument, 'parts' | 'wires'>): string | null {
  if (parts.length > MAX_PARTS) return `A sheet has at most ${MAX_PARTS} parts. Divide the network between sheets.`;
  if (wires.length > MAX_WIRES) return `A sheet has at most ${MAX_WIRES} wires. Divide the network between sheets.`;
  const far = ({ x, y }: { readonly x: number; readonly y: number }) => Math.max(Math.abs(x), Math.abs(y)) > MAX_COORDINATE;
  if (parts.some(({ at }) => far(at)) || wires.some(({ corners }) => corners.some(far))) {
    return 'That is beyond the edge of the sheet. Bring the drawing nearer to its middle first.';
  }
  return null;
}
