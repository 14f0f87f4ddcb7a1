/** A connection that ends in the open: two pins with nothing between them. */
export function BrokenWire() {
  return (
    <svg viewBox="0 0 320 80" width="320" height="80" aria-hidden="true" className="max-w-full">
      <g fill="none" stroke="var(--ink)" strokeWidth="1.75" strokeLinecap="round" strokeLinejoin="round">
        <path d="M0 40h52M52 29h48v22H52zM100 40h33M187 40h34" />
        <path d="M221 40a9 9 0 0 1 18 0a9 9 0 0 1 18 0a9 9 0 0 1 18 0M275 40h45" />
      </g>
      <g fill="var(--paper)" stroke="var(--falls)" strokeWidth="1.75">
        <circle cx="138" cy="40" r="4.5" />
        <circle cx="182" cy="40" r="4.5" />
      </g>
      <path d="M150 40h20" stroke="var(--falls)" strokeWidth="1.5" strokeDasharray="2 4" fill="none" />
    </svg>
  );
}
