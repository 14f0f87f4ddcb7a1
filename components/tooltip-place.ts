export type Side = 'top' | 'right' | 'bottom' | 'left';
export type TooltipPlace = { readonly x: number; readonly y: number };

type Size = { readonly width: number; readonly height: number };
type Box = Size & { readonly left: number; readonly top: number };

const GAP = 6;
const MARGIN = 8;

const opposite: Readonly<Record<Side, Side>> = { top: 'bottom', bottom: 'top', left: 'right', right: 'left' };

/**
 * Where to lay a box of `size` beside `anchor`: centred on the wished side, on the other one where it does not fit, and
 * pushed along so that it stays within the view. All in pixels of the view.
 */
export function besideOf(anchor: Box, size: Size, side: Side, view: Size): TooltipPlace {
  const wished = placeAt(anchor, size, side);
  const place = fits(wished, size, side, view) ? wished : placeAt(anchor, size, opposite[side]);
  return {
    x: within(place.x, MARGIN, view.width - size.width - MARGIN),
    y: within(place.y, MARGIN, view.height - size.height - MARGIN),
  };
}

function placeAt(anchor: Box, size: Size, side: Side): TooltipPlace {
  const middleX = anchor.left + (anchor.width - size.width) / 2;
  const middleY = anchor.top + (anchor.height - size.height) / 2;
  switch (side) {
    case 'top':
      return { x: middleX, y: anchor.top - size.height - GAP };
    case 'bottom':
      return { x: middleX, y: anchor.top + anchor.height + GAP };
    case 'left':
      return { x: anchor.left - size.width - GAP, y: middleY };
    case 'right':
      return { x: anchor.left + anchor.width + GAP, y: middleY };
  }
}

function fits(place: TooltipPlace, size: Size, side: Side, view: Size): boolean {
  return side === 'top' || side === 'bottom'
    ? place.y >= MARGIN && place.y + size.height <= view.height - MARGIN
    : place.x >= MARGIN && place.x + size.width <= view.width - MARGIN;
}

function within(value: number, least: number, most: number): number {
  return Math.max(least, Math.min(value, most));
}
