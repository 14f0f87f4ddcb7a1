export const menuFrame =
  'fade-in z-50 max-h-(--radix-popper-available-height) min-w-48 overflow-y-auto rounded-lg border border-rule bg-raised ' +
  'p-1 text-sm text-ink shadow-float';

export const menuItem =
  'flex min-h-8 cursor-pointer items-center gap-2.5 rounded-[5px] px-2.5 py-1 outline-none select-none ' +
  'data-disabled:cursor-default data-disabled:text-muted data-disabled:opacity-70 data-highlighted:bg-wash';

export const menuHeading = 'px-2.5 pt-2 pb-1 text-xs font-medium text-muted';
export const menuSeparator = 'mx-2 my-1 h-px bg-rule';
