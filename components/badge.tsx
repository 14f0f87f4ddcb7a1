import type { ReactNode } from 'react';
import { classNames } from './class-names';

export type BadgeTone = 'plain' | 'voltage' | 'current' | 'power' | 'holds' | 'falls' | 'caution';

const tones: Readonly<Record<BadgeTone, string>> = {
  plain: 'border-rule bg-sunken text-muted',
  voltage: 'border-voltage/35 bg-voltage/8 text-voltage',
  current: 'border-(--current)/35 bg-(--current)/8 text-(--current)',
  power: 'border-power/35 bg-power/8 text-power',
  holds: 'border-holds/35 bg-holds/8 text-holds',
  falls: 'border-falls/35 bg-falls/8 text-falls',
  caution: 'border-caution/40 bg-caution/8 text-caution',
};

export type BadgeProps = { readonly tone?: BadgeTone; readonly icon?: ReactNode; readonly children: ReactNode };

/** A small fact about a thing, in a word or a number with its word. */
export function Badge({ tone = 'plain', icon, children }: BadgeProps) {
  return (
    <span
      className={classNames(
        'inline-flex h-[22px] items-center gap-1 rounded-full border px-2 text-xs font-medium whitespace-nowrap',
        tones[tone],
      )}
    >
      {icon}
      {children}
    </span>
  );
}
