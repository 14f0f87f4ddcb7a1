'use client';

import type { ButtonHTMLAttributes, ReactNode, Ref } from 'react';
import { iconButtonStyle, type ButtonSize, type ButtonVariant } from './button-style';
import { classNames } from './class-names';
import { Tooltip } from './tooltip';

export type IconButtonProps = Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'aria-label' | 'aria-pressed'> & {
  /** What it does: its accessible name, and its tooltip. */
  readonly label: string;
  readonly icon: ReactNode;
  readonly shortcut?: string;
  /** For a switch: whether it is on. */
  readonly pressed?: boolean;
  readonly variant?: ButtonVariant;
  readonly size?: ButtonSize;
  readonly tooltipSide?: 'top' | 'right' | 'bottom' | 'left';
  readonly ref?: Ref<HTMLButtonElement>;
};

/** A button of one icon. */
export function IconButton({
  label,
  icon,
  shortcut,
  pressed,
  variant = 'quiet',
  size = 'medium',
  tooltipSide = 'bottom',
  type = 'button',
  className,
  ...rest
}: IconButtonProps) {
  return (
    <Tooltip label={label} shortcut={shortcut} side={tooltipSide}>
      <button
        {...rest}
        type={type}
        aria-label={label}
        aria-pressed={pressed}
        className={classNames(iconButtonStyle(variant, size), pressed === true && 'bg-voltage/12 text-voltage', className)}
      >
        {icon}
      </button>
    </Tooltip>
  );
}
