'use client';

import { FROM_HZ, frequencyOfStep, STEPS, TO_HZ } from './front-network';
import { formatQuantity } from '@/solver';

export type FrontBandProps = {
  readonly step: number;
  readonly onStep: (step: number) => void;
  /** The response in decibels at every step. */
  readonly response: readonly number[];
};

const TOP_DB = 8;
const BOTTOM_DB = -68;
const TICKS_HZ = [100, 1_000, 10_000, 100_000];

const percentOfDb = (db: number): number => ((TOP_DB - Math.max(db, BOTTOM_DB)) / (TOP_DB - BOTTOM_DB)) * 100;
const percentOfHz = (hz: number): number => (Math.log(hz / FROM_HZ) / Math.log(TO_HZ / FROM_HZ)) * 100;

/** The band: the response on a logarithmic frequency axis, and its handle, which is a slider to every device. */
export function FrontBand({ step, onStep, response }: FrontBandProps) {
  const at = (step / STEPS) * 100;
  const frequency = formatQuantity(frequencyOfStep(step), 'Hz', 3);
  const course = response.map((db, index) => `${((index / STEPS) * 100).toFixed(2)} ${percentOfDb(db).toFixed(2)}`);
  return (
    <div className="border-t border-rule bg-raised px-7 pt-9 pb-2 sm:px-12">
      <div className="relative h-24 rounded-sm outline-offset-4 has-focus-visible:outline-2 has-focus-visible:outline-voltage">
        <svg viewBox="0 0 100 100" preserveAspectRatio="none" aria-hidden="true" className="absolute inset-0 size-full">
          <g fill="none" vectorEffect="non-scaling-stroke" stroke="var(--grid)">
            {[0, -20, -40, -60].map((db) => (
              <path key={db} d={`M0 ${percentOfDb(db).toFixed(2)}h100`} vectorEffect="non-scaling-stroke" />
            ))}
            {decadeLines().map((hz) => (
              <path key={hz} d={`M${percentOfHz(hz).toFixed(2)} 0v100`} vectorEffect="non-scaling-stroke" />
            ))}
          </g>
          <path
            d={`M${course.join('L')}`}
            fill="none"
            stroke="var(--voltage)"
            strokeWidth="2"
            strokeLinejoin="round"
            vectorEffect="non-scaling-stroke"
          />
        </svg>
        <div aria-hidden="true" className="pointer-events-none absolute inset-y-0 w-px bg-ink" style={{ left: `${at.toFixed(2)}%` }}>
          <span
            className="absolute bottom-full mb-1.5 rounded-[5px] bg-ink px-2 py-0.5 font-mono text-[13px] whitespace-nowrap text-paper"
            style={{ transform: `translateX(-${at.toFixed(2)}%)` }}
          >
            {frequency}
          </span>
          <span
            className="absolute -left-1 size-2.5 -translate-y-1/2 rounded-full bg-ink"
            style={{ top: `${percentOfDb(response[step] ?? 0).toFixed(2)}%` }}
          />
        </div>
        <input
          type="range"
          min={0}
          max={STEPS}
          step={1}
          value={step}
          aria-label="Frequency"
          aria-valuetext={frequency}
          onChange={(event) => onStep(Number(event.target.value))}
          // Wider than the axis by half a thumb at each end, so that the thumb's middle runs from end to end of it.
          className="absolute inset-y-0 -left-3 m-0 h-full w-[calc(100%+1.5rem)] cursor-ew-resize touch-pan-y opacity-0"
        />
      </div>
      <div aria-hidden="true" className="relative mt-1.5 h-5 font-mono text-xs text-muted">
        {TICKS_HZ.map((hz) => (
          <span key={hz} className="absolute -translate-x-1/2 whitespace-nowrap" style={{ left: `${percentOfHz(hz).toFixed(2)}%` }}>
            {formatQuantity(hz, 'Hz', 1)}
          </span>
        ))}
      </div>
    </div>
  );
}

function decadeLines(): readonly number[] {
  const lines: number[] = [];
  for (let decade = FROM_HZ; decade < TO_HZ; decade *= 10) {
    for (let digit = 1; digit < 10; digit += 1) lines.push(decade * digit);
  }
  return [...lines, TO_HZ];
}
