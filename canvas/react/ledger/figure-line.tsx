import type { ReactNode } from 'react';
import { classNames } from '@/components/class-names';

/** Each quantity has its colour, and its name and unit beside it. */
export type FigureTone = 'voltage' | 'current' | 'power' | 'plain';

export const figureTones: Readonly<Record<FigureTone, string>> = {
  voltage: 'text-voltage',
  current: 'text-current',
  power: 'text-power',
  plain: 'text-ink',
};

export type FigureLineProps = {
  readonly label: ReactNode;
  readonly tone?: FigureTone;
  /** The figure, or several, one below the other; null where it is not determined. */
  readonly figures: readonly string[] | null;
};

/** A line of a `<dl>`: what it is at the left, its figures lined up at the right. */
export function FigureLine({ label, tone = 'plain', figures }: FigureLineProps) {
  return (
    <div className="flex min-h-[23px] items-baseline justify-between gap-3">
      <dt className="shrink-0 text-[13px] text-muted">{label}</dt>
      {figures === null ? (
        <dd className="text-[13px] text-muted">not determined</dd>
      ) : (
        figures.length > 0 && (
          <dd className={classNames('text-right font-mono text-[13px] tabular-nums', figureTones[tone])}>
            {figures.map((figure) => (
              <span key={figure} className="block leading-[20px] whitespace-nowrap">
                {figure}
              </span>
            ))}
          </dd>
        )
      )}
    </div>
  );
}
