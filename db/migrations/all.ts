import type { Migration } from './migration';
import { people } from './0001-people';
import { sheets } from './0002-sheets';
import { notes } from './0003-notes';

/** The schema's history, the oldest first. */
export const MIGRATIONS: readonly Migration[] = [...people, ...sheets, ...notes];
