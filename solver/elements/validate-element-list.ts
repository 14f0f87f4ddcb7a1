import type { ElementList } from './element-list';

export type ElementListResult =
  | { readonly ok: true; readonly list: ElementList }
  | { readonly ok: false; readonly message: string };

export declare function validateElementList(value: unknown): ElementListResult;
