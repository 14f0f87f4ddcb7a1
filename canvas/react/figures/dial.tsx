import { memo } from 'react';

/** Radius of the hand at full length, inside a circle of 8 px in a glyph of 18. */
const REACH = 6.6;
/** A hand shorter than this could not be told from none. */
const LEAST = 1.6;

export type DialProps = {
  /** The phase: 0° to the right, anticlockwise positive. */
  readonly degrees: number;
  /** The size relative to the largest of its kind, 0 to 1; null where the reading is not determined. */
  readonly length: number | null;
};

/** The small clock-like glyph of a reading, in the colour of the text around it. The figures beside it say the same. */
export const Dial = memo(function Dial({ degrees, length }: DialProps) {
  const reach = length === null || length === 0 ? 0 : Math.max(LEAST, Math.min(1, length) * REACH);
  const radians = (degrees * Math.PI) / 180;
  return (
    <svg width="18" height="18" viewBox="-9 -9 18 18" aria-hidden="true" className="shrink-0">
      <circle
        r="8"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.25"
        strokeDasharray={length === null ? '2 2.2' : undefined}
      />
      {reach > 0 && (
        <line
          x2={(reach * Math.cos(radians)).toFixed(2)}
          y2={(-reach * Math.sin(radians)).toFixed(2)}
          stroke="currentColor"
          strokeWidth="1.75"
          strokeLinecap="round"
        />
      )}
    </svg>
  );
});
