'use client';

import { memo } from 'react';
import type { NodeProps } from 'reactflow';
import { bodyOf } from '../../document/lookup';
import type { Part } from '../../document/types';
import { grow } from '../../geometry/box';
import { LABEL_LINE, labelLines, labelWidth, type TextBlock } from '../../labels/label-layout';
import { marksOf } from '../../network/marks';
import { useSheet } from '../sheet-context';
import { nodeBox, type PartNodeData } from './flow-nodes';
import { Symbol } from './symbol';

/** A part on the drawing: its symbol, what is written beside it, and its outline when selected or at fault. */
export const PartNodeView = memo(function PartNodeView({ data }: NodeProps<PartNodeData>) {
  const { part, label } = data;
  const selected = useSheet((state) => state.selection.parts.has(part.id));
  const fault = useSheet((state) => marksOf(state.readings).faultyParts.get(part.id));
  const caution = useSheet((state) => marksOf(state.readings).cautions.get(part.id));
  const dead = useSheet((state) => marksOf(state.readings).dead.has(part.id));
  const box = nodeBox(part);
  return (
    <svg
      className="block overflow-visible"
      width={box.right - box.left}
      height={box.bottom - box.top}
      viewBox={`${box.left - part.at.x} ${box.top - part.at.y} ${box.right - box.left} ${box.bottom - box.top}`}
      aria-hidden="true"
    >
      <Outline part={part} selected={selected} faulty={fault !== undefined} />
      <g className={dead ? 'text-muted' : 'text-ink'} opacity={dead ? 0.55 : 1}>
        <Symbol kind={part.kind} placement={part} />
      </g>
      {label && <Label part={part} block={label} dead={dead} />}
      {caution !== undefined && <CautionMark part={part} label={label} />}
    </svg>
  );
});

function Outline({ part, selected, faulty }: { part: Part; selected: boolean; faulty: boolean }) {
  if (!selected && !faulty) return null;
  const body = grow(bodyOf(part), part.kind === 'junction' ? 1 : 6);
  const shape = {
    x: body.left - part.at.x,
    y: body.top - part.at.y,
    width: body.right - body.left,
    height: body.bottom - body.top,
    rx: 4,
  };
  return (
    <>
      {selected && <rect {...shape} className="fill-voltage/10 stroke-voltage" strokeWidth={1.25} />}
      {faulty && (
        <rect {...shape} className="stroke-falls" fill="none" strokeWidth={1.5} strokeDasharray={selected ? '2 4' : '5 4'} />
      )}
    </>
  );
}

function Label({ part, block, dead }: { part: Part; block: TextBlock; dead: boolean }) {
  const lines = labelLines(part);
  return (
    <g className={dead ? 'opacity-60' : undefined}>
      {lines.map((line, index) => {
        const [designator, ...rest] = index === 0 ? line.split(' ') : ['', line];
        return (
          <text
            key={index}
            x={block.at.x}
            y={block.at.y + index * LABEL_LINE + LABEL_LINE / 2}
            dy="0.35em"
            textAnchor={block.align}
            className="text-[12px]"
          >
            <tspan className="fill-ink font-sans font-semibold">{designator}</tspan>
            <tspan className="fill-muted font-mono" dx={index === 0 && rest.length > 0 ? 6 : 0}>
              {rest.join(' ')}
            </tspan>
          </text>
        );
      })}
      {dead && (
        <text
          x={block.at.x}
          y={block.at.y + lines.length * LABEL_LINE + LABEL_LINE / 2}
          dy="0.35em"
          textAnchor={block.align}
          className="fill-muted font-sans text-[11px] italic"
        >
          dead here
        </text>
      )}
    </g>
  );
}

/** A triangle with a bar and a dot, at the end of the label's first line, where nothing else is written. */
function CautionMark({ part, label }: { part: Part; label: TextBlock | null }) {
  const body = bodyOf(part);
  const width = labelWidth(labelLines(part)[0] ?? '');
  const beside = label && {
    x: label.at.x + { start: width, middle: width / 2, end: -width }[label.align] + (label.align === 'end' ? -17 : 12),
    y: label.at.y + LABEL_LINE / 2,
  };
  const { x, y } = beside ?? { x: body.left - part.at.x - 8, y: body.top - part.at.y - 8 };
  return (
    <g transform={`translate(${x} ${y})`} className="text-caution">
      <path d="M0-7L7.5 6H-7.5Z" className="fill-paper" stroke="currentColor" strokeWidth={1.5} strokeLinejoin="round" />
      <path d="M0-2.6V1.6M0 3.7V3.8" stroke="currentColor" strokeWidth={1.6} strokeLinecap="round" />
    </g>
  );
}
