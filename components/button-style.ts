import { classNames } from './class-names';

/** `primary` is the one thing to do here; `plain` the rest; `quiet` has no frame; `danger` takes something away. */
export type ButtonVariant = 'primary' | 'plain' | 'quiet' | 'danger';
/** 30 px for a masthead, 36 px in forms, 44 px where a thumb presses it. */
export type ButtonSize = 'small' | 'medium' | 'large';

const base =
  'inline-flex shrink-0 cursor-pointer items-center justify-center gap-2 rounded-md border font-medium whitespace-nowrap ' +
  'select-none transition-[background-color,border-color,color,opacity] duration-[120ms] ' +
  'disabled:cursor-not-allowed disabled:opacity-55 aria-disabled:cursor-not-allowed aria-disabled:opacity-55';

const byVariant: Readonly<Record<ButtonVariant, string>> = {
  primary: 'border-ink bg-ink text-paper hover:bg-ink/88 active:bg-ink/80',
  plain: 'border-rule bg-raised text-ink hover:border-edge hover:bg-sunken active:bg-wash',
  quiet: 'border-transparent bg-transparent text-ink hover:bg-wash active:bg-rule/60',
  danger: 'border-falls bg-falls text-paper hover:bg-falls/88 active:bg-falls/80',
};

const bySize: Readonly<Record<ButtonSize, string>> = {
  small: 'h-[30px] px-3 text-[13px]',
  medium: 'h-9 px-4 text-sm',
  large: 'h-11 px-5 text-[15px]',
};

const squareBySize: Readonly<Record<ButtonSize, string>> = {
  small: 'size-[30px] text-[13px]',
  medium: 'size-9 text-sm',
  large: 'size-11 text-[15px]',
};

/** The look of a button for something that is not one: a link that leads to the next step. */
export function buttonStyle(variant: ButtonVariant = 'plain', size: ButtonSize = 'medium'): string {
  return classNames(base, byVariant[variant], bySize[size]);
}

export function iconButtonStyle(variant: ButtonVariant = 'quiet', size: ButtonSize = 'medium'): string {
  return classNames(base, byVariant[variant], squareBySize[size]);
}
