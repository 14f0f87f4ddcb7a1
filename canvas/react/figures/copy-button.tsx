'use client';

import { Check, Copy } from 'lucide-react';
import { useEffect, useState, type ReactNode } from 'react';
import { Tooltip } from '@/components/tooltip';
import { useSheetStore } from '../sheet-context';
import { useCommands } from '../screen-context';

/** How long the tick stays in place of the icon. */
const TICK_MS = 1_600;

export type CopyButtonProps = {
  readonly label: string;
  /** Made when pressed: it may be long. */
  readonly text: () => string;
  readonly children?: ReactNode;
};

/** Puts a text on the clipboard, and says whether that worked. */
export function CopyButton({ label, text, children }: CopyButtonProps) {
  const store = useSheetStore();
  const commands = useCommands();
  const [copied, setCopied] = useState(false);

  useEffect(() => {
    if (!copied) return;
    const timer = setTimeout(() => setCopied(false), TICK_MS);
    return () => clearTimeout(timer);
  }, [copied]);

  const copy = async () => {
    const { say } = store.getState();
    try {
      await commands.context().screen.writeClipboard(text());
      setCopied(true);
      say('Copied.');
    } catch {
      say('The browser did not let the text be copied. Allow this page to use the clipboard, and press again.');
    }
  };

  const Icon = copied ? Check : Copy;
  return (
    <Tooltip label={label} side="left">
      <button
        type="button"
        aria-label={label}
        onClick={() => void copy()}
        className="inline-flex h-6 min-w-6 shrink-0 cursor-pointer items-center justify-center gap-1.5 rounded-[5px] text-[12.5px] text-muted hover:bg-wash hover:text-ink"
      >
        <Icon size={14} strokeWidth={1.75} aria-hidden="true" className={copied ? 'text-holds' : undefined} />
        {children}
      </button>
    </Tooltip>
  );
}
