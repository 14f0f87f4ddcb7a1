import type { Placement } from '../geometry/placement';
import type { Point } from '../geometry/point';
import type { PartValues } from '../parts/definition';
import type { PartKind } from '../parts/registry';

export type PartId = string;
export type WireId = string;

/** A part on the sheet. Field values are kept as typed; what they mean is read when the network is built. */
export type Part = Placement & {
  readonly id: PartId;
  readonly kind: PartKind;
  /** Unique on the sheet; empty for kinds that have none (reference, node name, junction). */
  readonly designator: string;
  readonly values: PartValues;
};

export type PinRef = { readonly part: PartId; readonly pin: string };

/** A connection from pin to pin. Its course is worked out from its ends, through the corners a hand placed. */
export type Wire = {
  readonly id: WireId;
  readonly from: PinRef;
  readonly to: PinRef;
  readonly corners: readonly Point[];
};

/** How readings are shown. The solver and the file know only rms on the cosine. */
export type Convention = { readonly amplitude: 'rms' | 'peak'; readonly form: 'polar' | 'rectangular' };

/** The range of the Band's axis, in hertz. */
export type BandRange = { readonly fromHz: number; readonly toHz: number };

/** One drawing and all that belongs to it, version 1: the same in the browser, in the database and in a file. */
export type SheetDocument = {
  readonly version: 1;
  /** What the network is for, in a paragraph. */
  readonly purpose: string;
  /** As typed: hertz, or radians a second with that unit. */
  readonly operatingFrequency: string;
  readonly band: BandRange;
  readonly convention: Convention;
  readonly parts: readonly Part[];
  readonly wires: readonly Wire[];
};
