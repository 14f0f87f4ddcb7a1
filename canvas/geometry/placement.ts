import { add, type Point } from './point';

/** Quarter turns clockwise, in degrees. */
export type Turn = 0 | 90 | 180 | 270;

/** The way a wire leaves a pin; `any` where it may leave every way (a junction). */
export type Direction = 'left' | 'right' | 'up' | 'down' | 'any';

/** Where a part lies: its own frame is mirrored left to right first, then turned, then moved to `at`. */
export type Placement = { readonly at: Point; readonly turn: Turn; readonly mirrored: boolean };

/** A vector of the part's own frame as it lies on the sheet, without the part's position. */
export function orient(placement: Pick<Placement, 'turn' | 'mirrored'>, local: Point): Point {
  const x = placement.mirrored ? -local.x : local.x;
  const y = local.y;
  // `+ 0` keeps −0 out of documents and keys.
  switch (placement.turn) {
    case 0:
      return { x: x + 0, y: y + 0 };
    case 90:
      return { x: -y + 0, y: x + 0 };
    case 180:
      return { x: -x + 0, y: -y + 0 };
    case 270:
      return { x: y + 0, y: -x + 0 };
  }
}

/** A point of the part's own frame in sheet coordinates. */
export function place(placement: Placement, local: Point): Point {
  return add(placement.at, orient(placement, local));
}

const VECTORS: Record<Exclude<Direction, 'any'>, Point> = {
  left: { x: -1, y: 0 },
  right: { x: 1, y: 0 },
  up: { x: 0, y: -1 },
  down: { x: 0, y: 1 },
};

/** The unit vector of a direction; zero for `any`. */
export function directionVector(direction: Direction): Point {
  return direction === 'any' ? { x: 0, y: 0 } : VECTORS[direction];
}

export function orientDirection(placement: Pick<Placement, 'turn' | 'mirrored'>, direction: Direction): Direction {
  if (direction === 'any') return 'any';
  const vector = orient(placement, VECTORS[direction]);
  if (vector.x !== 0) return vector.x > 0 ? 'right' : 'left';
  return vector.y > 0 ? 'down' : 'up';
}

export function turnBy(turn: Turn, quarterTurns: number): Turn {
  const turned = (((turn / 90 + quarterTurns) % 4) + 4) % 4;
  return ([0, 90, 180, 270] as const)[turned as 0 | 1 | 2 | 3];
}
