import type { Role } from '@/app/_shared/roles';

/** The roles as people speak of them. */
export const ROLE_NAMES: Readonly<Record<Role, string>> = {
  owner: 'Owner',
  designer: 'Designer',
  reviewer: 'Reviewer',
  viewer: 'Viewer',
};

/** What each role is for, and where it ends. */
export const ROLE_WORDS: Readonly<Record<Role, string>> = {
  owner: 'Runs the team: its members and their roles. May do everything that the others may.',
  designer: 'Draws, sets values, watches the currents move, takes snapshots, and answers notes. Does not close them.',
  reviewer:
    'A senior colleague: reads the drawing and the figures, pins notes, closes them and opens them again. Does not change the network.',
  viewer: 'Builds, tests or buys from it: reads every sheet, its snapshots and notes, and exports it. Changes nothing.',
};
