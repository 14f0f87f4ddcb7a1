import { memo, useMemo } from 'react';
import type { BandRange } from '../../document/types';
import { axisTicks, percentOf, type Tick } from './axis';

export type FrequencyAxisProps = {
  readonly band: BandRange;
  /** The length for which marks and labels are chosen, in px; the axis itself fills its frame. */
  readonly lengthPx: number;
};

/** From the bottom of the frame: the labels' line, and the rule on which the marks stand. */
const RULE_AT = 22;
const HEIGHTS: Readonly<Record<Tick['weight'], number>> = { decade: 14, labelled: 10, minor: 5 };

/** The Band's logarithmic axis. Places are in percent, so that a new width moves nothing until the marks are chosen again. */
export const FrequencyAxis = memo(function FrequencyAxis({ band, lengthPx }: FrequencyAxisProps) {
  const ticks = useMemo(() => axisTicks(band, lengthPx), [band, lengthPx]);
  return (
    <div aria-hidden="true" className="pointer-events-none absolute inset-0 select-none">
      <div className="absolute inset-x-0 h-px bg-edge" style={{ bottom: RULE_AT }} />
      {ticks.map((tick) => (
        <span
          key={tick.hz}
          className={tick.weight === 'minor' ? 'absolute w-px bg-rule' : 'absolute w-px bg-edge'}
          style={{ left: percentOf(tick.share), bottom: RULE_AT, height: HEIGHTS[tick.weight] }}
        />
      ))}
      {ticks.map(
        (tick) =>
          tick.label !== null && (
            <span
              key={tick.hz}
              className="absolute bottom-0.5 -translate-x-1/2 font-mono text-[11.5px] leading-4 whitespace-nowrap text-muted tabular-nums"
              style={{ left: percentOf(tick.share) }}
            >
              {tick.label}
            </span>
          ),
      )}
    </div>
  );
});
