'use client';

import { LogOut, UserRound } from 'lucide-react';
import { leave } from './leave';
import { Avatar } from '@/components/avatar';
import { MenuButton } from '@/components/menu-button';
import { applyTheme, parseTheme, THEME_LABELS, THEMES, type Theme } from '@/components/theme';
import { useTheme } from '@/components/use-theme';

export type PersonMenuProps = { readonly name: string; readonly email: string; readonly theme: Theme };

/** Who is signed in, and the way out. Holds the theme too, for screens too narrow to show its switch. */
export function PersonMenu({ name, email, theme }: PersonMenuProps) {
  const chosen = useTheme(theme);
  return (
    <MenuButton
      label={`Signed in as ${name}`}
      className="flex size-9 cursor-pointer items-center justify-center rounded-full hover:bg-wash data-[state=open]:bg-wash"
      entries={[
        { kind: 'heading', label: email },
        { kind: 'link', label: 'Account', href: '/account', icon: <UserRound size={16} strokeWidth={1.75} aria-hidden="true" /> },
        { kind: 'separator' },
        {
          kind: 'choice',
          label: 'Theme',
          value: chosen,
          options: THEMES.map((one) => ({ value: one, label: THEME_LABELS[one] })),
          onValueChange: (value) => applyTheme(parseTheme(value)),
        },
        { kind: 'separator' },
        {
          kind: 'item',
          label: 'Sign out',
          icon: <LogOut size={16} strokeWidth={1.75} aria-hidden="true" />,
          onSelect: () => void leave(),
        },
      ]}
    >
      <Avatar name={name} decorative />
    </MenuButton>
  );
}
