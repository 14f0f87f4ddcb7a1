'use server';

import { action } from '@/app/_server/action';
import { failure, success } from '@/app/_server/errors';
import { memberSubject } from '@/app/_server/subjects';
import { changeRoleInput, memberInput } from '@/app/_shared/wire';
import * as team from '@/db/queries/team';

const LAST_OWNER = 'A team keeps at least one owner. Make someone else an owner first.';

export const changeRole = action(
  { name: 'team.changeRole', permission: 'team.changeRole', input: changeRoleInput, subject: memberSubject },
  async ({ viewer, input }) => {
    const outcome = await team.changeMemberRole(viewer, input);
    switch (outcome.kind) {
      case 'changed':
        return success({ role: input.role });
      case 'lastOwner':
        return failure('conflict', LAST_OWNER);
      case 'notFound':
        return failure('notFound');
    }
  },
);

/** Ends the membership, and with it every session of that member, at once. What they drew and wrote stays. */
export const removeMember = action(
  { name: 'team.removeMember', permission: 'team.removeMember', input: memberInput, subject: memberSubject },
  async ({ viewer, input }) => {
    const outcome = await team.removeMember(viewer, input.memberId);
    switch (outcome.kind) {
      case 'changed':
        return success({ removed: true as const });
      case 'lastOwner':
        return failure('conflict', LAST_OWNER);
      case 'notFound':
        return failure('notFound');
    }
  },
);
