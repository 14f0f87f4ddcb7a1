/** Drawing units: px at 100 %, x to the right, y downwards. */
export type Point = { readonly x: number; readonly y: number };

/** Parts, pins and corners sit on this grid. */
export const GRID = 10;

export const ORIGIN: Point = { x: 0, y: 0 };

export function add(a: Point, b: Point): Point {
  return { x: a.x + b.x, y: a.y + b.y };
}

export function subtract(a: Point, b: Point): Point {
  return { x: a.x - b.x, y: a.y - b.y };
}

export function samePoint(a: Point, b: Point): boolean {
  return a.x === b.x && a.y === b.y;
}

export function snap(point: Point): Point {
  // `+ 0` turns −0 into 0, which would otherwise reach saved documents.
  return { x: Math.round(point.x / GRID) * GRID + 0, y: Math.round(point.y / GRID) * GRID + 0 };
}

export function distance(a: Point, b: Point): number {
  return Math.hypot(a.x - b.x, a.y - b.y);
}

/** Key of a grid point for maps and sets. */
export function pointKey(point: Point): string {
  return `${point.x},${point.y}`;
}
