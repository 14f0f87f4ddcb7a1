import type { FrontPhasor } from './front-network';

export type DialProps = {
  readonly phasor: FrontPhasor;
  /** The largest of its kind on the picture: its hand reaches the rim. */
  readonly largest: number;
  readonly cx: number;
  readonly cy: number;
  readonly kind: 'voltage' | 'current';
};

const RADIUS = 9;

/** The clock-like glyph of a reading: 0° to the right, anticlockwise positive, the hand as long as the value is large. */
export function Dial({ phasor, largest, cx, cy, kind }: DialProps) {
  const size = Math.hypot(phasor.re, phasor.im);
  const length = largest === 0 ? 0 : Math.max(2, (RADIUS - 2) * (size / largest));
  const x = cx + (size === 0 ? 0 : (phasor.re / size) * length);
  const y = cy - (size === 0 ? 0 : (phasor.im / size) * length);
  return (
    <g fill="none" stroke={kind === 'voltage' ? 'var(--voltage)' : 'var(--current)'} strokeLinecap="round">
      <circle cx={cx} cy={cy} r={RADIUS} strokeWidth="1.5" />
      <path d={`M${cx} ${cy}L${x.toFixed(2)} ${y.toFixed(2)}`} strokeWidth="2" />
    </g>
  );
}
