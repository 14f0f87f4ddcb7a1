import type { ReactNode } from 'react';
import { AheadLink } from './ahead-link';
import { classNames } from '@/components/class-names';
import { Logo } from '@/components/logo';
import { Masthead } from '@/components/masthead';
import { Skeleton } from '@/components/skeleton';

export type HouseRoom = 'sheets' | 'team' | 'account';

const ROOMS: readonly { readonly room: HouseRoom; readonly href: string; readonly label: string }[] = [
  { room: 'sheets', href: '/sheets', label: 'Sheets' },
  { room: 'team', href: '/team', label: 'Team' },
  { room: 'account', href: '/account', label: 'Account' },
];

export type HouseMastheadProps = {
  readonly room: HouseRoom;
  /** Not known yet while a page is on its way. */
  readonly teamName?: string;
  readonly actions?: ReactNode;
};

export function HouseMasthead({ room, teamName, actions }: HouseMastheadProps) {
  return (
    <Masthead className="sticky top-0 z-20" actions={actions ?? <Skeleton className="size-[26px] rounded-full" />}>
      <AheadLink href="/sheets" aria-label="Ohmstead: all sheets" className="-m-1 flex shrink-0 rounded-md p-1 text-ink">
        <Logo size={28} />
      </AheadLink>
      {teamName === undefined ? (
        <Skeleton className="hidden h-4 w-32 sm:block" />
      ) : (
        <p className="hidden min-w-0 truncate text-[15px] font-semibold sm:block">{teamName}</p>
      )}
      <nav aria-label="Main" className="flex h-full items-stretch sm:ml-3">
        {ROOMS.map((one) => (
          <AheadLink
            key={one.room}
            href={one.href}
            aria-current={one.room === room ? 'page' : undefined}
            className={classNames(
              'relative flex min-w-6 items-center px-2.5 text-sm sm:px-3',
              one.room === room
                ? 'font-semibold text-ink after:absolute after:inset-x-2.5 after:bottom-[-1px] after:h-0.5 after:bg-(--current) sm:after:inset-x-3'
                : 'text-muted hover:text-ink',
            )}
          >
            {one.label}
          </AheadLink>
        ))}
      </nav>
    </Masthead>
  );
}
