import type { ButtonHTMLAttributes, ReactNode, Ref } from 'react';
import { buttonStyle, type ButtonSize, type ButtonVariant } from './button-style';
import { classNames } from './class-names';

export type ButtonProps = Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'aria-busy'> & {
  readonly variant?: ButtonVariant;
  readonly size?: ButtonSize;
  /** A 16 px icon before the text. */
  readonly icon?: ReactNode;
  /** Work that this button started is under way: it keeps its place, its width and the focus, and takes no press. */
  readonly busy?: boolean;
  readonly ref?: Ref<HTMLButtonElement>;
};

export function Button({
  variant = 'plain',
  size = 'medium',
  icon,
  busy = false,
  type = 'button',
  className,
  children,
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-busy={busy || undefined}
      // `disabled` would drop the focus to the page while the answer is awaited.
      aria-disabled={busy || undefined}
      onClick={(event) => {
        if (busy) {
          event.preventDefault();
          return;
        }
        onClick?.(event);
      }}
      className={classNames(buttonStyle(variant, size), className)}
    >
      {icon}
      {children}
    </button>
  );
}
