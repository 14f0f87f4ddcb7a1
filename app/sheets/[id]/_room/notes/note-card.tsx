'use client';

import { Check, MapPinOff } from 'lucide-react';
import { useEffect, useRef, useState } from 'react';
import { sayFailure } from '@/app/_client/say-failure';
import type { NoteThread } from '@/app/_shared/wire';
import type { SheetStore } from '@/canvas/store/sheet-store';
import { Button } from '@/components/button';
import { classNames } from '@/components/class-names';
import { RelativeTime } from '@/components/relative-time';
import { ReplyComposer } from './note-composer';
import { CLASS_NAMES } from './note-words';
import { useAnchorWords } from './use-anchor-words';
import { isPending, type Notes } from './use-notes';

export type NoteCardProps = {
  readonly store: SheetStore;
  readonly thread: NoteThread;
  readonly open: boolean;
  readonly keptAs: string;
  readonly may: { readonly reply: boolean; readonly resolve: boolean; readonly reopen: boolean };
  readonly notes: Pick<Notes, 'reply' | 'resolve' | 'reopen'>;
  readonly onOpen: () => void;
};

/** A note with its answers. Text is shown as text, line by line as it was typed. */
export function NoteCard({ store, thread, open, keptAs, may, notes, onOpen }: NoteCardProps) {
  const where = useAnchorWords(store, thread.anchor);
  const [replying, setReplying] = useState(false);
  const frame = useRef<HTMLLIElement>(null);
  const resolved = thread.resolved !== null;
  const pending = isPending(thread.id);

  useEffect(() => {
    if (open) frame.current?.scrollIntoView({ block: 'nearest' });
  }, [open]);

  const settle = async (act: (noteId: string) => ReturnType<Notes['resolve']>) => {
    const failure = await act(thread.id);
    if (failure !== null) sayFailure(failure);
  };

  return (
    <li
      ref={frame}
      data-note-thread={thread.number}
      aria-current={open || undefined}
      className={classNames('rounded-lg border bg-paper p-2.5', open ? 'border-power' : 'border-rule')}
    >
      <h3>
        <button
          type="button"
          onClick={onOpen}
          className="flex min-h-6 w-full cursor-pointer items-center gap-2 rounded-[5px] text-left text-[13px]"
        >
          <span
            className={classNames(
              'grid size-5 shrink-0 place-items-center rounded-full border-2 border-power text-[11px] font-semibold',
              resolved ? 'text-power' : 'bg-power text-paper',
            )}
          >
            {thread.number}
          </span>
          <span className="min-w-0 flex-1 truncate font-semibold text-power">
            {CLASS_NAMES[thread.class]} · {where.text}
          </span>
          <span className="shrink-0 text-xs text-muted">{pending ? 'sending…' : <RelativeTime at={thread.writtenAt} />}</span>
        </button>
      </h3>
      {where.gone && (
        <p className="mt-1 flex items-center gap-1.5 text-xs text-caution">
          <MapPinOff size={13} strokeWidth={1.75} aria-hidden="true" />
          What it was pinned to is no longer on the sheet; it is shown where that was.
        </p>
      )}
      <p className="mt-1 text-[13px] leading-snug wrap-anywhere whitespace-pre-line">{thread.text}</p>
      <p className="mt-1 text-xs text-muted">{thread.author}</p>
      {thread.replies.length > 0 && (
        <ul aria-label={`Replies to note ${thread.number}`} className="mt-2 flex flex-col gap-2 border-l-2 border-rule pl-2.5">
          {thread.replies.map((reply) => (
            <li key={reply.id}>
              <p className="text-[13px] leading-snug wrap-anywhere whitespace-pre-line">{reply.text}</p>
              <p className="mt-0.5 text-xs text-muted">
                {reply.author} · {isPending(reply.id) ? 'sending…' : <RelativeTime at={reply.writtenAt} />}
              </p>
            </li>
          ))}
        </ul>
      )}
      {thread.resolved !== null && (
        <p className="mt-2 flex items-center gap-1.5 text-xs text-holds">
          <Check size={14} strokeWidth={2} aria-hidden="true" className="shrink-0" />
          <span>
            Resolved by {thread.resolved.by}, <RelativeTime at={thread.resolved.at} />
          </span>
        </p>
      )}
      {replying ? (
        <ReplyComposer
          number={thread.number}
          keptAs={keptAs}
          onSend={(text) => notes.reply(thread.id, text)}
          onClose={() => setReplying(false)}
        />
      ) : (
        !pending && (
          <div className="mt-1.5 -mb-1 -ml-2 flex gap-1 empty:hidden">
            {may.reply && (
              <Button variant="quiet" size="small" className="px-2!" onClick={() => setReplying(true)}>
                Reply
              </Button>
            )}
            {!resolved && may.resolve && (
              <Button variant="quiet" size="small" className="px-2!" onClick={() => void settle(notes.resolve)}>
                Resolve
              </Button>
            )}
            {resolved && may.reopen && (
              <Button variant="quiet" size="small" className="px-2!" onClick={() => void settle(notes.reopen)}>
                Reopen
              </Button>
            )}
          </div>
        )
      )}
    </li>
  );
}
