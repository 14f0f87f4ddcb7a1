import type { SheetDocument } from '@/canvas/document/types';

/**
 * What someone who may only read has turned for themselves: the operating frequency, the Band, the convention. It is
 * kept when the sheet is changed under them, unless that very thing was never turned.
 * @param next the sheet as it is now
 * @param shown the sheet as it is shown, with what was turned
 * @param given the sheet as it was when it was last taken from the server
 */
export function keepLooks(next: SheetDocument, shown: SheetDocument, given: SheetDocument): SheetDocument {
  return {
    ...next,
    operatingFrequency: shown.operatingFrequency === given.operatingFrequency ? next.operatingFrequency : shown.operatingFrequency,
    band: same(shown.band, given.band) ? next.band : shown.band,
    convention: same(shown.convention, given.convention) ? next.convention : shown.convention,
  };
}

function same(a: object, b: object): boolean {
  return JSON.stringify(a) === JSON.stringify(b);
}
