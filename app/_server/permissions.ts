import type { Role } from '@/app/_shared/roles';

type Rule = { readonly description: string; readonly roles: readonly Role[] };

const EVERYONE = ['owner', 'designer', 'reviewer', 'viewer'] as const;
const DRAWING = ['owner', 'designer'] as const;
const TALKING = ['owner', 'designer', 'reviewer'] as const;
/**
 * Whoever draws the network answers a note but does not close it, not even a note of their own: a note is closed by
 * whoever reviews. So a closed note always means that a reviewer (or the owner) was satisfied.
 */
const CLOSING = ['owner', 'reviewer'] as const;
const OWNING = ['owner'] as const;

/** Who may do what in their own team: the one table, used by every server action, route handler and page. */
export const PERMISSIONS = {
  'sheet.list': { description: 'See the list of the team’s sheets', roles: EVERYONE },
  'sheet.read': { description: 'Open a sheet and see its readings', roles: EVERYONE },
  'sheet.export': { description: 'Export a sheet as a file', roles: EVERYONE },
  'sheet.create': { description: 'Begin a new sheet', roles: DRAWING },
  'sheet.import': { description: 'Make a sheet from a file', roles: DRAWING },
  'sheet.save': { description: 'Change a sheet’s network', roles: DRAWING },
  'sheet.rename': { description: 'Give a sheet another name', roles: DRAWING },
  'sheet.archive': { description: 'Put a sheet into the archive', roles: DRAWING },
  'sheet.restore': { description: 'Take a sheet out of the archive', roles: DRAWING },
  'sheet.clone': { description: 'Make a new sheet from a sheet or a snapshot', roles: DRAWING },
  'snapshot.read': { description: 'See a sheet’s snapshots', roles: EVERYONE },
  'snapshot.take': { description: 'Freeze a sheet as a snapshot', roles: DRAWING },
  'snapshot.restore': { description: 'Make a snapshot the sheet’s newest revision', roles: DRAWING },
  'note.read': { description: 'Read the notes on a sheet', roles: EVERYONE },
  'note.create': { description: 'Pin a note to a sheet', roles: TALKING },
  'note.reply': { description: 'Answer a note', roles: TALKING },
  'note.resolve': { description: 'Close a note', roles: CLOSING },
  'note.reopen': { description: 'Open a closed note again', roles: CLOSING },
  'team.read': { description: 'See who is in the team', roles: EVERYONE },
  'team.changeRole': { description: 'Change a member’s role', roles: OWNING },
  'team.removeMember': { description: 'Remove a member from the team', roles: OWNING },
  'account.changePassword': { description: 'Change one’s own password', roles: EVERYONE },
} as const satisfies Readonly<Record<string, Rule>>;

export type Permission = keyof typeof PERMISSIONS;

/** Whether someone of this role may do this within their own team. What is another team's is never found at all. */
export function allowed(viewer: { readonly role: Role }, permission: Permission): boolean {
  const roles: readonly Role[] = PERMISSIONS[permission].roles;
  return roles.includes(viewer.role);
}
