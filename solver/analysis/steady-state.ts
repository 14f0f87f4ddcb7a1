import type { ElementList } from '../elements/element-list';
import type { Problem } from './problem';
import type { Solution } from './solution';

export interface SolveOptions {
  /** The operating frequency, hertz; 0 is allowed. */
  readonly frequency: number;
}

export declare function solve(list: ElementList, options: SolveOptions): Solution | Problem;
