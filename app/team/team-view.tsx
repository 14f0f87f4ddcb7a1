'use client';

import { UserMinus } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import useSWR from 'swr';
import { changeRole, removeMember } from './actions';
import { ROLE_NAMES } from './roles-in-words';
import { attempt } from '@/app/_client/attempt';
import { fetchResult, type ReadFailure } from '@/app/_client/fetch-result';
import { loadPage } from '@/app/_client/load-page';
import { failureText, sayFailure } from '@/app/_client/say-failure';
import { ROLES, type Role } from '@/app/_shared/roles';
import type { MemberItem } from '@/app/_shared/wire';
import { Avatar } from '@/components/avatar';
import { ConfirmDialog } from '@/components/confirm-dialog';
import { IconButton } from '@/components/icon-button';
import { RelativeTime } from '@/components/relative-time';
import { Select } from '@/components/select';
import { toast } from '@/components/toast';

export type TeamViewProps = {
  readonly first: readonly MemberItem[];
  readonly may: { readonly changeRole: boolean; readonly removeMember: boolean };
};

const PATH = '/api/team';
const OPTIONS = ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }));

/** Who is in the team and as what; for an owner, with the means to change it. */
export function TeamView({ first, may }: TeamViewProps) {
  const router = useRouter();
  const [leaving, setLeaving] = useState<MemberItem | null>(null);
  const { data, error, mutate } = useSWR<readonly MemberItem[], ReadFailure>(PATH, fetchResult, { fallbackData: first });
  const members = data ?? first;

  /** Shows the change at once; what stood before stands again if it is refused. */
  const change = async (next: readonly MemberItem[], act: () => ReturnType<typeof changeRole | typeof removeMember>): Promise<boolean> => {
    let done = false;
    await mutate(
      async () => {
        const result = await attempt<unknown>(act);
        done = result.ok;
        if (!result.ok) sayFailure(result.error);
        return result.ok ? next : members;
      },
      { optimisticData: next, populateCache: true, revalidate: false },
    );
    await mutate();
    return done;
  };

  const setRole = async (member: MemberItem, role: Role): Promise<void> => {
    const next = members.map((one) => (one.id === member.id ? { ...one, role } : one));
    const done = await change(next, () => changeRole({ memberId: member.id, role }));
    if (!done) return;
    toast.done(`${member.name} is ${ROLE_NAMES[role].toLowerCase()} now.`);
    // One's own role decides what this page may show.
    if (member.self) router.refresh();
  };

  const remove = async (member: MemberItem): Promise<void> => {
    setLeaving(null);
    const next = members.filter((one) => one.id !== member.id);
    const done = await change(next, () => removeMember({ memberId: member.id }));
    if (!done) return;
    if (member.self) loadPage('/');
    else toast.done(`${member.name} is no longer in the team.`);
  };

  return (
    <section aria-labelledby="members">
      <h2 id="members" className="sr-only">
        Members
      </h2>
      {error !== undefined && (
        <p role="alert" className="mb-3 text-sm text-falls">
          {failureText(error.detail)}
        </p>
      )}
      <ul role="list" className="border-t border-rule">
        {members.map((member) => (
          <li key={member.id} className="flex flex-wrap items-center gap-x-3 gap-y-2 border-b border-rule py-3 sm:flex-nowrap">
            <Avatar name={member.name} size="medium" decorative />
            <div className="min-w-0 flex-1 max-sm:basis-[calc(100%-3rem)]">
              <p className="truncate text-[15px] font-semibold">
                {member.name}
                {member.self && <span className="font-normal text-muted"> (you)</span>}
              </p>
              <p className="truncate text-[13px] text-muted">
                {member.email}
                <span className="max-sm:hidden">
                  {' '}
                  · joined <RelativeTime at={member.joinedAt} />
                </span>
              </p>
            </div>
            {may.changeRole ? (
              <Select
                label={`Role of ${member.name}`}
                labelHidden
                options={OPTIONS}
                value={member.role}
                onValueChange={(role) => void setRole(member, role)}
                className="w-34 max-sm:ml-12"
              />
            ) : (
              <span className="text-sm text-muted max-sm:ml-12">{ROLE_NAMES[member.role]}</span>
            )}
            {may.removeMember && (
              <IconButton
                label={member.self ? 'Leave the team' : `Remove ${member.name} from the team`}
                icon={<UserMinus size={17} strokeWidth={1.75} aria-hidden="true" />}
                onClick={() => setLeaving(member)}
                className="text-muted hover:text-falls"
              />
            )}
          </li>
        ))}
      </ul>
      {leaving !== null && (
        <ConfirmDialog
          open
          danger
          onClose={() => setLeaving(null)}
          onConfirm={() => void remove(leaving)}
          title={leaving.self ? 'Leave the team?' : `Remove ${leaving.name} from the team?`}
          description={
            leaving.self
              ? 'You are signed out and cannot open its sheets any more. What you drew and wrote stays with the team.'
              : `${leaving.name} is signed out at once and cannot open its sheets any more. What they drew and wrote stays with the team.`
          }
          confirmLabel={leaving.self ? 'Leave' : 'Remove'}
        />
      )}
    </section>
  );
}
