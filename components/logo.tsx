import { classNames } from './class-names';

/** The mark: an ohm sign at home under a roof. The roof is the accent, the sign is ink. */
export function Logo({ size = 32, className }: { readonly size?: number; readonly className?: string }) {
  return (
    <svg viewBox="0 0 32 32" width={size} height={size} aria-hidden="true" className={classNames('shrink-0', className)}>
      <g fill="none" strokeWidth="2.4" strokeLinecap="round" strokeLinejoin="round">
        <path d="M4.5 12.2 16 4.2l11.5 8" className="stroke-(--current)" />
        <path d="M7.5 27h5.4v-2.6a7.3 7.3 0 1 1 6.2 0V27h5.4" stroke="currentColor" />
      </g>
    </svg>
  );
}

/** Mark and name together. */
export function Wordmark({ className }: { readonly className?: string }) {
  return (
    <span className={classNames('inline-flex items-center gap-2 text-ink', className)}>
      <Logo size={28} />
      <span className="text-[17px] font-semibold tracking-[-0.01em]">Ohmstead</span>
    </span>
  );
}
