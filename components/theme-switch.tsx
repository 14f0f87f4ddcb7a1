'use client';

import { Monitor, Moon, Sun } from 'lucide-react';
import { useId } from 'react';
import { classNames } from './class-names';
import { applyTheme, THEME_LABELS, THEMES, type Theme } from './theme';
import { useTheme } from './use-theme';

const ICONS = { day: Sun, night: Moon, system: Monitor } as const;

/** Daylight, night, or as the system has it; acts at once and is remembered in the `theme` cookie. */
export function ThemeSwitch({ theme, showLabels = false }: { readonly theme: Theme; readonly showLabels?: boolean }) {
  const chosen = useTheme(theme);
  // Two on one page must not be one group: the browser would untick the other.
  const group = useId();
  return (
    <div
      role="radiogroup"
      aria-label="Theme"
      className="inline-flex h-[30px] shrink-0 items-center rounded-md border border-rule bg-sunken p-0.5"
    >
      {THEMES.map((one) => {
        const Icon = ICONS[one];
        const isChosen = one === chosen;
        return (
          <label
            key={one}
            title={THEME_LABELS[one]}
            className={classNames(
              'flex h-6 min-w-7 cursor-pointer items-center justify-center gap-1.5 rounded-[5px] text-[13px] has-focus-visible:outline-2 has-focus-visible:outline-offset-1 has-focus-visible:outline-voltage',
              showLabels && 'px-2.5',
              isChosen ? 'bg-raised text-ink shadow-[0_0_0_1px_var(--rule)]' : 'text-muted hover:text-ink',
            )}
          >
            <input
              type="radio"
              name={group}
              value={one}
              checked={isChosen}
              onChange={() => applyTheme(one)}
              className="sr-only"
            />
            <Icon size={15} strokeWidth={1.75} aria-hidden="true" />
            <span className={showLabels ? undefined : 'sr-only'}>{THEME_LABELS[one]}</span>
          </label>
        );
      })}
    </div>
  );
}
