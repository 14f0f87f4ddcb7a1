'use client';

import { X } from 'lucide-react';
import { useEffect, useId, useLayoutEffect, useRef, type ReactNode } from 'react';
import { classNames } from './class-names';

export type DialogProps = {
  readonly open: boolean;
  /** Asked to close by Escape or the cross; the caller sets `open`. */
  readonly onClose: () => void;
  readonly title: string;
  readonly description?: ReactNode;
  /** `medium` for a form (440 px), `wide` for something to read or compare (760 px). */
  readonly width?: 'medium' | 'wide';
  /** `alertdialog` for a question that must be answered before going on. */
  readonly role?: 'dialog' | 'alertdialog';
  readonly children?: ReactNode;
  /** The buttons, the one to press last. */
  readonly footer?: ReactNode;
};

/**
 * A modal dialog on the platform's own `<dialog>`: the browser makes the rest of the page inert, keeps it above
 * everything whatever it stands in, and gives the focus back on closing. Nothing is injected into the page, which the
 * content security policy would refuse. Its content exists only while it is open, so a form in it starts fresh.
 *
 * The focus goes to what carries `data-autofocus`, else to the first field, else to the first button of the footer.
 */
export function Dialog({ open, ...rest }: DialogProps) {
  return open ? <OpenDialog {...rest} /> : null;
}

function OpenDialog({
  onClose,
  title,
  description,
  width = 'medium',
  role = 'dialog',
  children,
  footer,
}: Omit<DialogProps, 'open'>) {
  const id = useId();
  const frame = useRef<HTMLDialogElement>(null);
  const body = useRef<HTMLDivElement>(null);
  const close = useRef(onClose);
  useEffect(() => {
    close.current = onClose;
  }, [onClose]);

  useLayoutEffect(() => {
    const node = frame.current;
    if (node === null) return;
    node.showModal();
    const text = body.current;
    // Something long to read with nothing to press in it must still be scrolled by whoever has only keys.
    if (text !== null && text.scrollHeight > text.clientHeight && text.querySelector(STOPS) === null) text.tabIndex = 0;
    firstStop(node)?.focus();
    return () => node.close();
  }, []);

  return (
    <dialog
      ref={frame}
      role={role}
      aria-labelledby={`${id}-title`}
      aria-describedby={description === undefined ? undefined : `${id}-description`}
      onCancel={(event) => {
        // A file input inside sends the same event, bubbling, when its picker is dismissed.
        if (event.target !== event.currentTarget) return;
        event.preventDefault();
        close.current();
      }}
      onClose={(event) => {
        // The browser closes without asking on a second Escape; a late event of an earlier showing finds it open.
        if (event.target === event.currentTarget && !event.currentTarget.open) close.current();
      }}
      // What is typed here belongs here: keys must not reach the page's own shortcuts through React's tree.
      onKeyDown={(event) => event.stopPropagation()}
      className={classNames(
        'fade-in m-auto max-h-[min(88dvh,52rem)] w-[calc(100vw-2rem)] flex-col overflow-hidden rounded-xl border border-rule bg-raised p-0 text-ink shadow-float open:flex',
        width === 'medium' ? 'max-w-[440px]' : 'max-w-[760px]',
      )}
    >
      <header className="flex items-start gap-3 px-5 pt-4">
        <h2 id={`${id}-title`} className="min-w-0 flex-1 pt-1 text-[17px] leading-6 font-semibold text-balance">
          {title}
        </h2>
        <button
          type="button"
          data-dialog-close=""
          aria-label="Close"
          onClick={onClose}
          className="-mr-1.5 flex size-8 shrink-0 cursor-pointer items-center justify-center rounded-md text-muted hover:bg-wash hover:text-ink"
        >
          <X size={18} strokeWidth={1.75} aria-hidden="true" />
        </button>
      </header>
      <div ref={body} className="min-h-0 overflow-y-auto px-5 pt-1 pb-5">
        {description !== undefined && (
          <p id={`${id}-description`} className="text-sm leading-normal text-pretty text-muted">
            {description}
          </p>
        )}
        {children !== undefined && <div className={description === undefined ? 'pt-2' : 'pt-4'}>{children}</div>}
      </div>
      {footer !== undefined && (
        <footer className="flex flex-wrap justify-end gap-2 border-t border-rule bg-sunken px-5 py-3">{footer}</footer>
      )}
    </dialog>
  );
}

const STOPS = 'a[href], button, input, select, textarea, [tabindex]';

function firstStop(node: HTMLElement): HTMLElement | null {
  return (
    node.querySelector<HTMLElement>('[data-autofocus]') ??
    node.querySelector<HTMLElement>('input:not([type="hidden"]):not(:disabled), select, textarea') ??
    node.querySelector<HTMLElement>('footer button') ??
    node.querySelector<HTMLElement>('button')
  );
}
