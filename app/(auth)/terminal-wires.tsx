/**
 * The network around the form: from the left edge of the page a resistor and an inductor in series to the form's upper
 * terminal, a capacitor across, and the way back by the reference. Only a picture, and only where there is room.
 */
export function TerminalWires() {
  return (
    <>
      <svg
        viewBox="0 0 560 260"
        width="560"
        height="260"
        aria-hidden="true"
        className="absolute top-10 right-full max-w-none max-md:hidden"
      >
        <g fill="none" stroke="var(--ink)" strokeWidth="1.75" strokeLinecap="round" strokeLinejoin="round">
          <path d="M0 40h126" />
          <path d="M126 29h48v22h-48z" />
          <path d="M174 40h96" />
          <path d="M270 40a9 9 0 0 1 18 0a9 9 0 0 1 18 0a9 9 0 0 1 18 0a9 9 0 0 1 18 0" />
          <path d="M342 40h212" />
          <path d="M440 40v74M424 114h32M424 124h32M440 124v96" />
          <path d="M0 220h554" />
          <path d="M222 220v16M208 236h28" />
        </g>
        <g fill="var(--ink)">
          <circle cx="440" cy="40" r="4" />
          <circle cx="440" cy="220" r="4" />
          <circle cx="222" cy="220" r="4" />
        </g>
        <g fill="var(--raised)" stroke="var(--voltage)" strokeWidth="1.75">
          <circle cx="556" cy="40" r="3.5" />
          <circle cx="556" cy="220" r="3.5" />
        </g>
        <WireReadings />
      </svg>
      <svg
        viewBox="0 0 560 260"
        width="560"
        height="260"
        aria-hidden="true"
        className="absolute top-10 left-full max-w-none max-md:hidden"
      >
        <g fill="none" stroke="var(--ink)" strokeWidth="1.75" strokeLinecap="round" strokeLinejoin="round">
          <path d="M6 40h114v49M120 161v59H6" />
          <path d="M109 89h22v72h-22z" />
          <path d="M120 40h440M120 220h440" strokeDasharray="2 6" stroke="var(--edge)" />
        </g>
        <g fill="var(--ink)">
          <circle cx="120" cy="40" r="4" />
          <circle cx="120" cy="220" r="4" />
        </g>
        <g fill="var(--raised)" stroke="var(--voltage)" strokeWidth="1.75">
          <circle cx="4" cy="40" r="3.5" />
          <circle cx="4" cy="220" r="3.5" />
        </g>
      </svg>
    </>
  );
}

/** Dials without figures: there is nothing solved here, and so nothing to read. */
function WireReadings() {
  return (
    <g fill="none" strokeWidth="1.5" strokeLinecap="round">
      <g stroke="var(--current)">
        <circle cx="150" cy="78" r="9" />
        <path d="M150 78 157.5 76" />
        <circle cx="306" cy="78" r="9" />
        <path d="M306 78 311.5 83.5" />
      </g>
      <g stroke="var(--voltage)">
        <circle cx="476" cy="119" r="9" />
        <path d="M476 119 476 111" />
      </g>
    </g>
  );
}
