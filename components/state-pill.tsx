import { classNames } from './class-names';

/** Where the keeping of an open sheet stands. */
export type KeepingState = 'saved' | 'saving' | 'local' | 'conflict' | 'unavailable';

export type StatePillProps = { readonly state: KeepingState; readonly children: string };

/** A mark and a few words on the state of the work: the shape differs as well as the colour. */
export function StatePill({ state, children }: StatePillProps) {
  return (
    <span className="inline-flex min-w-0 items-center gap-2 text-[13px] text-muted">
      <svg viewBox="0 0 10 10" aria-hidden="true" className={classNames('size-2.5 shrink-0', COLOURS[state])}>
        <StateMark state={state} />
      </svg>
      <span className="truncate">{children}</span>
    </span>
  );
}

const COLOURS: Readonly<Record<KeepingState, string>> = {
  saved: 'text-holds',
  saving: 'text-muted',
  local: 'text-caution',
  conflict: 'text-falls',
  unavailable: 'text-falls',
};

function StateMark({ state }: { readonly state: KeepingState }) {
  switch (state) {
    case 'saved':
      return <circle cx="5" cy="5" r="3.5" fill="currentColor" />;
    case 'saving':
      return <circle cx="5" cy="5" r="3.25" fill="none" stroke="currentColor" strokeWidth="1.5" />;
    case 'local':
      return <path d="M5 1.2 9.2 8.6H.8Z" fill="currentColor" />;
    case 'conflict':
    case 'unavailable':
      return <path d="M1.8 1.8l6.4 6.4m0-6.4L1.8 8.2" fill="none" stroke="currentColor" strokeWidth="1.75" strokeLinecap="round" />;
  }
}
