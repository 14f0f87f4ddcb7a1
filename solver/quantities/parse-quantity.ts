import type { Unit } from './unit';

export type ParsedQuantity =
  | { readonly ok: true; readonly value: number; readonly echo: string }
  | { readonly ok: false; readonly message: string };

export declare function parseQuantity(text: string, unit: Unit): ParsedQuantity;
