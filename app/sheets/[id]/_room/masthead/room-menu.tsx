import { Camera, Copy, Download, FileStack, Keyboard, LayoutList, Printer } from 'lucide-react';
import type { SheetOrigin } from '@/app/_shared/wire';
import { isMac, keyWords } from '@/canvas/react/help/key-words';
import type { MenuEntry } from '@/components/menu-entry';
import { applyTheme, parseTheme, THEME_LABELS, THEMES, type Theme } from '@/components/theme';
import { originWords } from './room-masthead';

export type RoomMenuProps = {
  readonly theme: Theme;
  readonly origin: SheetOrigin | null;
  readonly onSnapshot?: () => void;
  readonly onSnapshots: () => void;
  readonly onClone?: () => void;
  /** The server's file; null where only this machine has what is shown. */
  readonly exportPath: string | null;
  readonly onExport: () => void;
  readonly onKeys: () => void;
};

const icon = { size: 16, strokeWidth: 1.75, 'aria-hidden': true } as const;

/** What can be done with the sheet as a whole. */
export function roomMenu({
  theme,
  origin,
  onSnapshot,
  onSnapshots,
  onClone,
  exportPath,
  onExport,
  onKeys,
}: RoomMenuProps): readonly MenuEntry[] {
  const entries: MenuEntry[] = [];
  if (onSnapshot !== undefined) {
    entries.push({ kind: 'item', label: 'Take a snapshot…', icon: <Camera {...icon} />, shortcut: keyWords('mod+s', isMac()), onSelect: onSnapshot });
  }
  entries.push({ kind: 'item', label: 'Snapshots…', icon: <FileStack {...icon} />, onSelect: onSnapshots });
  if (onClone !== undefined) {
    entries.push({ kind: 'item', label: 'Clone…', icon: <Copy {...icon} />, onSelect: onClone });
  }
  entries.push({ kind: 'separator' });
  entries.push(
    exportPath === null
      ? { kind: 'item', label: 'Export file', icon: <Download {...icon} />, onSelect: onExport }
      : { kind: 'link', label: 'Export file', icon: <Download {...icon} />, href: exportPath, download: true },
  );
  entries.push({ kind: 'item', label: 'Print…', icon: <Printer {...icon} />, onSelect: () => window.print() });
  entries.push({ kind: 'separator' });
  entries.push({ kind: 'item', label: 'Keys', icon: <Keyboard {...icon} />, shortcut: '?', onSelect: onKeys });
  entries.push({
    kind: 'choice',
    label: 'Theme',
    value: theme,
    options: THEMES.map((one) => ({ value: one, label: THEME_LABELS[one] })),
    onValueChange: (value) => applyTheme(parseTheme(value)),
  });
  entries.push({ kind: 'separator' });
  if (origin !== null) {
    entries.push({ kind: 'link', label: originWords(origin), icon: <Copy {...icon} />, href: `/sheets/${origin.sheetId}` });
  }
  entries.push({ kind: 'link', label: 'All sheets', icon: <LayoutList {...icon} />, href: '/sheets' });
  return entries;
}
