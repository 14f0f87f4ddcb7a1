import { orient, type Placement } from './placement';
import type { Point } from './point';

/** An upright rectangle; `right` and `bottom` are coordinates, not sizes. */
export type Box = { readonly left: number; readonly top: number; readonly right: number; readonly bottom: number };

export function boxOfPoints(points: readonly Point[]): Box | null {
  const first = points[0];
  if (!first) return null;
  let { x: left, y: top } = first;
  let { x: right, y: bottom } = first;
  for (const { x, y } of points) {
    if (x < left) left = x;
    if (x > right) right = x;
    if (y < top) top = y;
    if (y > bottom) bottom = y;
  }
  return { left, top, right, bottom };
}

/** The box of a part's own frame as it lies on the sheet. */
export function placeBox(placement: Placement, local: Box): Box {
  const a = orient(placement, { x: local.left, y: local.top });
  const b = orient(placement, { x: local.right, y: local.bottom });
  return {
    left: placement.at.x + Math.min(a.x, b.x),
    top: placement.at.y + Math.min(a.y, b.y),
    right: placement.at.x + Math.max(a.x, b.x),
    bottom: placement.at.y + Math.max(a.y, b.y),
  };
}

export function unite(boxes: readonly Box[]): Box | null {
  return boxOfPoints(
    boxes.flatMap((box) => [
      { x: box.left, y: box.top },
      { x: box.right, y: box.bottom },
    ]),
  );
}

export function grow(box: Box, by: number): Box {
  return { left: box.left - by, top: box.top - by, right: box.right + by, bottom: box.bottom + by };
}

export function contains(box: Box, point: Point): boolean {
  return point.x >= box.left && point.x <= box.right && point.y >= box.top && point.y <= box.bottom;
}

export function overlap(a: Box, b: Box): boolean {
  return a.left <= b.right && b.left <= a.right && a.top <= b.bottom && b.top <= a.bottom;
}

export function centreOf(box: Box): Point {
  return { x: (box.left + box.right) / 2, y: (box.top + box.bottom) / 2 };
}
