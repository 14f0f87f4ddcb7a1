'use client';

import { REFERENCE_NODE } from '@/solver';
import { partsById } from '../../document/lookup';
import type { DrawnNode } from '../../network/nodes';
import { conventionAt, formatReading } from '../../network/format-reading';
import { compareNames } from '../../network/reading-rows';
import { useSheet } from '../sheet-context';
import { FigureLine } from './figure-line';
import { NameButton } from './name-button';

/** A rail can have hundreds of parts on it; past this many they are counted. */
const MOST_NAMES = 24;

/** A node: what it is called, its voltage, and the parts that meet in it. */
export function NodePanel({ node }: { readonly node: DrawnNode }) {
  const document = useSheet((state) => state.document);
  const voltage = useSheet((state) => state.readings.nodes.get(node.name)) ?? null;
  const frequencyHz = useSheet((state) => state.readings.frequencyHz);
  const convention = conventionAt(document.convention, frequencyHz);
  const byId = partsById(document);
  const parts = [...new Set(node.pins.map(({ part }) => part))]
    .flatMap((id) => byId.get(id) ?? [])
    .filter(({ designator }) => designator !== '')
    .sort((a, b) => compareNames(a.designator, b.designator));
  return (
    <div className="flex flex-col gap-2">
      <dl>
        <FigureLine label="Node" figures={[nodeTitle(node)]} />
        <FigureLine label="Voltage" tone="voltage" figures={voltage && [formatReading(voltage, 'V', convention, 4)]} />
      </dl>
      <div className="flex flex-wrap gap-1" role="group" aria-label="Parts on this node">
        {parts.slice(0, MOST_NAMES).map((part) => (
          <NameButton key={part.id} name={part.designator} place={{ parts: [part.id] }} />
        ))}
        {parts.length > MOST_NAMES && (
          <span className="self-center text-[13px] text-muted">and {parts.length - MOST_NAMES} more parts</span>
        )}
        {parts.length === 0 && <span className="text-[13px] text-muted">No part is on this node yet.</span>}
      </div>
    </div>
  );
}

/** What a node is called where a word is needed for it. */
export function nodeTitle(node: DrawnNode): string {
  if (node.name === REFERENCE_NODE) return '0, the reference';
  return node.named ? node.name : `${node.name} (not named)`;
}
