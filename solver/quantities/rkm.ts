import type { Unit } from './unit';

export interface RkmTolerance {
  /** Percent of the value, or the unit itself when `absolute`. */
  readonly minus: number;
  readonly plus: number;
  readonly absolute: boolean;
}

export type ParsedRkm =
  | { readonly ok: true; readonly value: number; readonly tolerance: RkmTolerance | null }
  | { readonly ok: false; readonly message: string };

export declare function parseRkm(text: string, unit: Unit): ParsedRkm;
