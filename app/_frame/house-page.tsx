import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { HouseFrame } from './house-frame';
import { HouseMasthead, type HouseRoom } from './house-masthead';
import { PersonMenu } from './person-menu';
import type { Viewer } from '@/app/_shared/wire';
import { parseTheme, THEME_COOKIE } from '@/components/theme';
import { ThemeSwitch } from '@/components/theme-switch';

export type HousePageProps = {
  readonly viewer: Viewer;
  readonly room: HouseRoom;
  readonly width?: 'list' | 'text';
  readonly children: ReactNode;
};

/** The frame of every page but the open sheet: masthead and content. */
export async function HousePage({ viewer, room, width, children }: HousePageProps) {
  const theme = parseTheme((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <HouseFrame
      width={width}
      masthead={
        <HouseMasthead
          room={room}
          teamName={viewer.teamName}
          actions={
            <>
              <span className="hidden md:contents">
                <ThemeSwitch theme={theme} />
              </span>
              <PersonMenu name={viewer.name} email={viewer.email} theme={theme} />
            </>
          }
        />
      }
    >
      {children}
    </HouseFrame>
  );
}
