'use client';

import { Copy, Ellipsis } from 'lucide-react';
import Link from 'next/link';
import type { SheetOrigin } from '@/app/_shared/wire';
import { Button } from '@/components/button';
import { classNames } from '@/components/class-names';
import { IconButton } from '@/components/icon-button';
import { Logo } from '@/components/logo';
import { Menu } from '@/components/menu';
import type { MenuEntry } from '@/components/menu-entry';
import { StatePill } from '@/components/state-pill';
import type { KeepingWords } from '../keeping/words';
import { SheetTitle } from './sheet-title';

export type RoomMastheadProps = {
  readonly teamName: string;
  readonly name: string;
  readonly origin: SheetOrigin | null;
  readonly words: KeepingWords;
  /** Why, for the tooltip. */
  readonly stateTitle?: string;
  /** Where the state can be looked into: the conflict. */
  readonly onState?: () => void;
  readonly onRename?: (name: string) => void;
  readonly onSnapshot?: () => void;
  readonly onClone?: () => void;
  readonly menu: readonly MenuEntry[];
};

/** The strip above an open sheet. On a phone it keeps the name and the state; the rest is in the menu. */
export function RoomMasthead(props: RoomMastheadProps) {
  const { teamName, name, origin, words, stateTitle, onState, onRename, onSnapshot, onClone, menu } = props;
  return (
    <div className="flex h-12 items-center gap-3 border-b border-rule bg-raised pr-2 pl-3 sm:pr-4 sm:pl-4">
      <div className="flex min-w-0 flex-1 items-center gap-2 sm:gap-3">
        <Link href="/sheets" aria-label="Ohmstead: all sheets" className="-m-1 flex shrink-0 rounded-md p-1 text-ink">
          <Logo size={28} />
        </Link>
        <div className="flex min-w-0 items-center gap-1.5">
          <Link
            href="/sheets"
            className="hidden min-w-6 truncate rounded-[5px] text-sm text-muted hover:text-ink lg:block lg:max-w-52"
          >
            {teamName}
          </Link>
          <span aria-hidden="true" className="hidden text-xs text-muted lg:inline">
            ▸
          </span>
          <SheetTitle name={name} onRename={onRename} />
        </div>
        <div className="flex shrink-0 items-center gap-3 sm:gap-4 print:hidden">
          <State words={words} title={stateTitle} onPress={onState} />
          <span className="hidden h-[26px] items-center rounded-full border border-rule bg-sunken px-5 text-[13px] md:inline-flex">
            In work
          </span>
        </div>
        {origin !== null && (
          <Link
            href={`/sheets/${origin.sheetId}`}
            title={originWords(origin)}
            className="hidden min-w-6 items-center gap-1.5 truncate rounded-[5px] text-[13px] text-muted hover:text-ink xl:flex print:hidden"
          >
            <Copy size={14} strokeWidth={1.75} aria-hidden="true" className="shrink-0" />
            <span className="truncate">{originWords(origin)}</span>
          </Link>
        )}
      </div>
      <div className="flex shrink-0 items-center gap-1.5 print:hidden">
        <span className="hidden gap-1.5 md:flex">
          {onSnapshot !== undefined && (
            <Button size="small" onClick={onSnapshot}>
              Snapshot
            </Button>
          )}
          {onClone !== undefined && (
            <Button size="small" onClick={onClone}>
              Clone
            </Button>
          )}
        </span>
        <Menu
          label="Sheet menu"
          entries={menu}
          trigger={<IconButton label="More" size="small" icon={<Ellipsis size={18} strokeWidth={1.75} aria-hidden="true" />} />}
        />
      </div>
    </div>
  );
}

export function originWords(origin: SheetOrigin): string {
  const which = origin.snapshotName === null ? `revision ${origin.revision}` : `snapshot “${origin.snapshotName}”`;
  return `Cloned from ${origin.sheetName}, ${which}`;
}

function State({
  words,
  title,
  onPress,
}: {
  readonly words: KeepingWords;
  readonly title?: string;
  readonly onPress?: () => void;
}) {
  const pill = (
    <>
      <span className="hidden sm:contents">
        <StatePill state={words.state}>{words.text}</StatePill>
      </span>
      <span className="contents sm:hidden">
        <StatePill state={words.state}>{words.short}</StatePill>
      </span>
    </>
  );
  // As wide as its longest words, so that nothing beside it moves while the state changes.
  const frame = 'flex h-[30px] w-[6.25rem] items-center rounded-md sm:w-[11.25rem]';
  if (onPress === undefined) {
    return (
      <span data-keeping={words.state} title={title} className={frame}>
        {pill}
      </span>
    );
  }
  return (
    <button
      type="button"
      data-keeping={words.state}
      title={title}
      onClick={onPress}
      className={classNames(frame, 'cursor-pointer border border-falls px-2 hover:bg-wash')}
    >
      {pill}
    </button>
  );
}
