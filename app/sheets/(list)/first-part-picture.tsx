/** An open end, a part, an open end: a drawing that waits to be begun. */
export function FirstPartPicture() {
  return (
    <svg viewBox="0 0 240 60" width="240" height="60" aria-hidden="true">
      <g fill="none" stroke="var(--ink)" strokeWidth="1.75" strokeLinecap="round" strokeLinejoin="round">
        <path d="M30 30H88M152 30h58" strokeDasharray="2 5" stroke="var(--edge)" />
        <path d="M92 30h8v-9h40v18h-40v-9m40 0h8" />
      </g>
      <g fill="var(--paper)" stroke="var(--voltage)" strokeWidth="1.75">
        <circle cx="88" cy="30" r="4" />
        <circle cx="152" cy="30" r="4" />
      </g>
    </svg>
  );
}
