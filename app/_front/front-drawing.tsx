import { Dial } from './dial';
import { NODES, PARTS, type FrontNode, type FrontPart, type FrontPhasor, type FrontReadings } from './front-network';
import { formatPolar } from '@/solver';

type Place = { readonly x: number; readonly y: number };

const LABELS: Readonly<Record<FrontPart, Place & { readonly value: string; readonly anchor: 'middle' | 'start' }>> = {
  R1: { x: 150, y: 68, value: '600\u2009Ω', anchor: 'middle' },
  C1: { x: 254, y: 172, value: '82.0\u2009nF', anchor: 'start' },
  L1: { x: 340, y: 66, value: '60.0\u2009mH', anchor: 'middle' },
  C2: { x: 474, y: 172, value: '82.0\u2009nF', anchor: 'start' },
  R2: { x: 668, y: 172, value: '600\u2009Ω', anchor: 'start' },
};
/** Where the dial of a current stands; its text follows it. */
const CURRENTS: Readonly<Record<FrontPart, Place>> = {
  R1: { x: 88, y: 121 },
  C1: { x: 263, y: 194 },
  L1: { x: 277, y: 121 },
  C2: { x: 483, y: 194 },
  R2: { x: 677, y: 194 },
};
const NODE_X: Readonly<Record<FrontNode, number>> = { mid: 230, out: 450 };

export const largestOf = (phasors: readonly FrontPhasor[]): number =>
  Math.max(...phasors.map(({ re, im }) => Math.hypot(re, im)));

/** The sheet: the network as drawn, with a reading at every part and node. Figures are left out on a small screen. */
export function FrontDrawing({ readings, label }: { readonly readings: FrontReadings; readonly label: string }) {
  const largestCurrent = largestOf(Object.values(readings.currents));
  const largestVoltage = largestOf(Object.values(readings.voltages));
  return (
    <svg viewBox="22 6 800 322" role="img" aria-label={label} className="block h-auto w-full">
      <Network />
      {PARTS.map((part) => {
        const { x, y, value, anchor } = LABELS[part];
        const at = CURRENTS[part];
        const current = readings.currents[part];
        return (
          <g key={part}>
            <text x={x} y={y} textAnchor={anchor} className="fill-ink text-[15px] font-semibold max-sm:text-[22px]">
              {part}
              <tspan dx="7" className="fill-muted font-mono text-[13px] font-normal max-sm:hidden">
                {value}
              </tspan>
            </text>
            <g className="max-sm:hidden">
              <Dial phasor={current} largest={largestCurrent} cx={at.x} cy={at.y} kind="current" />
              <text x={at.x + 16} y={at.y + 4.5} className="fill-current font-mono text-[13px]">
                {formatPolar(current.re, current.im, 'A', 3)}
              </text>
            </g>
          </g>
        );
      })}
      {NODES.map((node) => {
        const voltage = readings.voltages[node];
        const x = NODE_X[node];
        return (
          <g key={node} className="max-sm:hidden">
            <path d={`M${x} 40v46`} fill="none" stroke="var(--voltage)" strokeWidth="1.5" strokeDasharray="2 3" />
            <rect x={x - 16} y="14" width="194" height="26" rx="13" fill="var(--raised)" stroke="var(--rule)" />
            <Dial phasor={voltage} largest={largestVoltage} cx={x} cy={27} kind="voltage" />
            <text x={x + 17} y={31.5} className="fill-voltage font-mono text-[13px]">
              <tspan className="font-sans text-[14px] font-semibold">{node}</tspan>
              <tspan dx="8">{formatPolar(voltage.re, voltage.im, 'V', 3)}</tspan>
            </text>
          </g>
        );
      })}
    </svg>
  );
}

function Network() {
  return (
    <>
      <g fill="none" stroke="var(--ink)" strokeWidth="1.75" strokeLinecap="round" strokeLinejoin="round">
        <path d="M60 154V90h68M172 90h132M376 90h264v68M640 202v68H60v-64" />
        <circle cx="60" cy="180" r="26" />
        <path d="M46 180q7-14 14 0t14 0" />
        <path d="M128 79h44v22h-44zM629 158h22v44h-22z" />
        <path d="M304 90a9 9 0 0 1 18 0a9 9 0 0 1 18 0a9 9 0 0 1 18 0a9 9 0 0 1 18 0" />
        <path d="M230 90v85M214 175h32M214 185h32M230 185v85M450 90v85M434 175h32M434 185h32M450 185v85" />
        <path d="M340 270v16M326 286h28" />
      </g>
      <g fill="var(--ink)">
        {[230, 450].map((x) => (
          <g key={x}>
            <circle cx={x} cy="90" r="4" />
            <circle cx={x} cy="270" r="4" />
          </g>
        ))}
        <circle cx="340" cy="270" r="4" />
      </g>
      <text x="94" y="152" className="fill-muted font-mono text-[15px] max-sm:hidden">
        +
      </text>
      <text x="98" y="186" className="fill-ink text-[15px] font-semibold max-sm:text-[22px]">
        VS1
      </text>
      <text x="98" y="204" className="fill-muted font-mono text-[13px] max-sm:hidden">
        1.00{'\u2009'}V
      </text>
    </>
  );
}
