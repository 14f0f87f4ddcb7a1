'use client';

import type { Tool } from '../../commands/command';
import { targetEnd, type WireTarget } from '../../commands/edits/wires';
import type { SheetDocument } from '../../document/types';
import { snap, type Point } from '../../geometry/point';
import { pathOf, routeWire } from '../../geometry/route';
import { definitionOf } from '../../parts/registry';
import { place } from '../../geometry/placement';
import { useSheet } from '../sheet-context';
import { usePointerPlace, type PointerPlace } from './pointer-place';
import { Symbol } from './symbol';

/** What is in the hand: the part that would be placed, the wire that is being drawn, the keyboard's place. */
export function HandLayer({ pointer, targetAt }: { pointer: PointerPlace; targetAt(place: Point): WireTarget }) {
  const tool = useSheet((state) => state.tool);
  const cursor = useSheet((state) => state.cursor);
  const document = useSheet((state) => state.document);
  const held = tool.kind === 'place' || tool.kind === 'wire';
  const under = usePointerPlace(pointer, held);
  // The keyboard leads as long as it has a place; the first move of the pointer takes that place away.
  const at = cursor ?? under;
  return (
    <svg className="pointer-events-none absolute left-0 top-0 z-[4] h-px w-px overflow-visible" aria-hidden="true">
      {held && at && <Held tool={tool} at={at} document={document} targetAt={targetAt} />}
      {cursor && <Crosshair at={cursor} />}
    </svg>
  );
}

function Held({
  tool,
  at,
  document,
  targetAt,
}: {
  tool: Tool;
  at: Point;
  document: SheetDocument;
  targetAt(place: Point): WireTarget;
}) {
  if (tool.kind === 'place') {
    const grid = snap(at);
    return (
      <g transform={`translate(${grid.x} ${grid.y})`} className="text-voltage" opacity={0.75}>
        <Symbol kind={tool.part} placement={tool} />
        {definitionOf(tool.part).pins.map((pin) => {
          const { x, y } = place({ at: { x: 0, y: 0 }, turn: tool.turn, mirrored: tool.mirrored }, pin.at);
          return <circle key={pin.name} cx={x} cy={y} r={3.5} fill="none" stroke="currentColor" strokeWidth={1.25} />;
        })}
        {tool.part === 'nodeName' && (
          <rect x={-32} y={-53} width={64} height={26} rx={13} fill="none" stroke="currentColor" strokeDasharray="3 3" />
        )}
      </g>
    );
  }
  if (tool.kind !== 'wire') return null;
  const end = targetAt(at);
  const lands = end.kind !== 'open';
  return (
    <g className="text-voltage">
      {tool.from && (
        <path
          d={pathOf(routeWire(targetEnd(document, tool.from), targetEnd(document, end), tool.corners))}
          fill="none"
          stroke="currentColor"
          strokeWidth={1.75}
          strokeDasharray={lands ? undefined : '5 4'}
          strokeLinejoin="round"
        />
      )}
      <circle cx={end.at.x} cy={end.at.y} r={lands ? 6 : 3} fill={lands ? 'none' : 'currentColor'} stroke="currentColor" strokeWidth={1.75} />
      {tool.corners.map((corner, index) => (
        <rect key={index} x={corner.x - 2.5} y={corner.y - 2.5} width={5} height={5} fill="currentColor" />
      ))}
    </g>
  );
}

function Crosshair({ at }: { at: Point }) {
  return (
    <g transform={`translate(${at.x} ${at.y})`} className="stroke-voltage" strokeWidth={1.25} fill="none">
      <path d="M-14 0H-5M5 0H14M0-14V-5M0 5V14" />
      <circle r={2} />
    </g>
  );
}
