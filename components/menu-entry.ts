import type { ReactNode } from 'react';

/** What a menu holds; the same list serves a button's menu and a context menu. */
export type MenuEntry =
  | {
      readonly kind: 'item';
      readonly label: string;
      readonly icon?: ReactNode;
      /** A key or chord that does the same, such as `Ctrl D`. */
      readonly shortcut?: string;
      readonly danger?: boolean;
      readonly disabled?: boolean;
      readonly onSelect: () => void;
    }
  | {
      readonly kind: 'link';
      readonly label: string;
      readonly icon?: ReactNode;
      readonly href: string;
      /** The address answers with a file, which the browser saves. */
      readonly download?: boolean;
    }
  | {
      readonly kind: 'switch';
      readonly label: string;
      readonly checked: boolean;
      readonly onCheckedChange: (checked: boolean) => void;
    }
  | {
      readonly kind: 'choice';
      readonly label: string;
      readonly value: string;
      readonly options: readonly { readonly value: string; readonly label: string }[];
      readonly onValueChange: (value: string) => void;
    }
  | { readonly kind: 'heading'; readonly label: string }
  | { readonly kind: 'separator' };
