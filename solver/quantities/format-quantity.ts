import type { Unit } from './unit';

export declare function formatQuantity(value: number, unit: Unit, digits: number): string;
export declare function formatAngle(degrees: number, decimals: number): string;
export declare function formatPolar(re: number, im: number, unit: Unit, digits: number): string;
export declare function formatRectangular(re: number, im: number, unit: Unit, digits: number): string;
export declare function formatFull(value: number): string;
