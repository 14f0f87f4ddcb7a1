'use client';

import { Check, CircleAlert, X } from 'lucide-react';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { classNames } from './class-names';
import { currentToasts, subscribeToToasts, toast, type Toast } from './toast';

const NONE: readonly Toast[] = [];

/** Shows what `toast` says. Stands once on a page, as a polite live region that is there before its first words. */
export function Toaster() {
  const toasts = useSyncExternalStore(subscribeToToasts, currentToasts, () => NONE);
  const [held, setHeld] = useState(false);
  return (
    <section
      aria-label="Messages"
      aria-live="polite"
      aria-relevant="additions"
      onMouseEnter={() => setHeld(true)}
      onMouseLeave={() => setHeld(false)}
      onFocus={() => setHeld(true)}
      onBlur={() => setHeld(false)}
      className="pointer-events-none fixed inset-x-4 bottom-4 z-50 flex flex-col items-center gap-2 sm:right-auto sm:items-start print:hidden"
    >
      {toasts.map((one) => (
        <ToastCard key={one.id} toast={one} held={held} />
      ))}
    </section>
  );
}

function ToastCard({ toast: one, held }: { readonly toast: Toast; readonly held: boolean }) {
  useEffect(() => {
    if (held) return;
    const timer = setTimeout(() => toast.dismiss(one.id), one.staysMs);
    return () => clearTimeout(timer);
  }, [held, one.id, one.staysMs]);

  return (
    <div
      className={classNames(
        'fade-in pointer-events-auto flex w-full max-w-[420px] items-start gap-2.5 rounded-lg border bg-raised py-2.5 pr-1.5 pl-3 text-sm text-ink shadow-float',
        one.tone === 'failed' ? 'border-falls' : 'border-rule',
      )}
    >
      <ToneMark tone={one.tone} />
      <p className="min-w-0 flex-1 py-px leading-snug wrap-anywhere">{one.text}</p>
      {one.action !== undefined && (
        <button
          type="button"
          onClick={() => {
            one.action?.onPress();
            toast.dismiss(one.id);
          }}
          className="-my-0.5 min-h-7 shrink-0 cursor-pointer rounded-[5px] px-2 font-semibold text-voltage hover:bg-wash"
        >
          {one.action.label}
        </button>
      )}
      <button
        type="button"
        aria-label="Dismiss"
        onClick={() => toast.dismiss(one.id)}
        className="-my-0.5 flex size-7 shrink-0 cursor-pointer items-center justify-center rounded-[5px] text-muted hover:bg-wash hover:text-ink"
      >
        <X size={15} strokeWidth={1.75} aria-hidden="true" />
      </button>
    </div>
  );
}

function ToneMark({ tone }: { readonly tone: Toast['tone'] }) {
  switch (tone) {
    case 'done':
      return <Check size={17} strokeWidth={2} aria-hidden="true" className="mt-0.5 shrink-0 text-holds" />;
    case 'failed':
      return <CircleAlert size={17} strokeWidth={2} aria-hidden="true" className="mt-0.5 shrink-0 text-falls" />;
    case 'plain':
      return null;
  }
}
