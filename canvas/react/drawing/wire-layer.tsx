'use client';

import { useMemo } from 'react';
import { coursesOf } from '../../document/lookup';
import { pathOf } from '../../geometry/route';
import { marksOf, meetingPlaces, openPins } from '../../network/marks';
import { useSheet } from '../sheet-context';

/** Names by which the move gesture finds the resting wires and its own. */
export const RESTING_WIRES = 'resting-wires';
export const MOVING_WIRES = 'moving-wires';

/**
 * All wires, in one layer under the parts. Resting wires are a single path, so that a drawing of hundreds costs the
 * browser one element; the few that need another look, and those that a gesture moves, are drawn over it.
 */
export function WireLayer() {
  const document = useSheet((state) => state.document);
  const nodes = useSheet((state) => state.readings.network.nodes);
  const selected = useSheet((state) => state.selection.wires);
  const faulty = useSheet((state) => marksOf(state.readings).faultyWires);
  const courses = useMemo(() => coursesOf(document), [document]);
  const resting = useMemo(() => [...courses.values()].map(pathOf).join(''), [courses]);
  const meetings = useMemo(() => meetingPlaces(document), [document]);
  const open = useMemo(() => openPins(document, nodes), [document, nodes]);
  const path = (ids: ReadonlySet<string>) => [...ids].map((id) => pathOf(courses.get(id) ?? [])).join('');
  return (
    <svg className="pointer-events-none absolute left-0 top-0 h-px w-px overflow-visible text-ink" aria-hidden="true">
      {selected.size > 0 && (
        <path d={path(selected)} fill="none" className="stroke-voltage/30" strokeWidth={7} strokeLinecap="round" strokeLinejoin="round" />
      )}
      <path
        id={RESTING_WIRES}
        d={resting}
        fill="none"
        stroke="currentColor"
        strokeWidth={1.75}
        strokeLinejoin="round"
        strokeLinecap="round"
      />
      <path id={MOVING_WIRES} fill="none" stroke="currentColor" strokeWidth={1.75} strokeLinejoin="round" strokeLinecap="round" />
      {faulty.size > 0 && (
        <path d={path(faulty)} fill="none" className="stroke-falls" strokeWidth={2} strokeDasharray="5 4" />
      )}
      {meetings.map(({ x, y }) => (
        <circle key={`${x},${y}`} cx={x} cy={y} r={3.5} fill="currentColor" />
      ))}
      {open.map(({ ref, at }) => (
        <circle key={`${ref.part}/${ref.pin}`} cx={at.x} cy={at.y} r={3.5} className="fill-paper stroke-muted" strokeWidth={1.25} />
      ))}
    </svg>
  );
}
