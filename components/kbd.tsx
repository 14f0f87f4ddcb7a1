import { classNames } from './class-names';

export type KbdProps = {
  /** A key or a chord; parts are set apart by spaces: `Ctrl Z`. */
  readonly children: string;
  /** `inverse` on ink, as in a tooltip. */
  readonly tone?: 'normal' | 'inverse';
};

/** A key as printed on a keyboard. */
export function Kbd({ children, tone = 'normal' }: KbdProps) {
  return (
    <span className="inline-flex gap-0.5">
      {children.split(' ').map((key, index) => (
        <kbd
          key={`${key}${index}`}
          className={classNames(
            'inline-flex h-5 min-w-5 items-center justify-center rounded-[4px] border px-1 font-sans text-[11px] leading-none font-medium',
            tone === 'normal' ? 'border-rule bg-sunken text-muted' : 'border-paper/40 text-paper',
          )}
        >
          {key}
        </kbd>
      ))}
    </span>
  );
}
