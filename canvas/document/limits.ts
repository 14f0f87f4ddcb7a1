/** Bounds of what a sheet may hold, checked wherever a document comes in. Far above real work, far below harm. */
export const MAX_DOCUMENT_CHARACTERS = 2_000_000;
export const MAX_PARTS = 5_000;
export const MAX_WIRES = 10_000;
export const MAX_CORNERS = 200;
export const MAX_TEXT = 200;
export const MAX_PURPOSE = 2_000;
/** Drawing units (px at 100 %) from the origin. */
export const MAX_COORDINATE = 100_000;
