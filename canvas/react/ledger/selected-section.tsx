'use client';

import { partsById, pinKey, pinsOf } from '../../document/lookup';
import { isEmptySelection, type Selection } from '../../document/selection';
import type { Part, Wire } from '../../document/types';
import { definitionOf } from '../../parts/registry';
import { useSheet } from '../sheet-context';
import type { SheetState } from '../../store/sheet-store';
import { LedgerSection } from './ledger-section';
import { NodePanel } from './node-panel';
import { PartFields } from './part-fields';
import { PartReadings } from './part-readings';
import { plural, SeveralPanel } from './several-panel';
import { SheetPanel } from './sheet-panel';

/** What is selected, or the sheet itself when nothing is. */
export function SelectedSection() {
  const selection = useSheet((state) => state.selection);
  const part = useSheet((state) => onlyPart(state, selection));
  const wire = useSheet((state) => onlyWire(state, selection));
  if (isEmptySelection(selection)) {
    return (
      <LedgerSection name="selected" title="This sheet" aside="nothing selected">
        <SheetPanel />
      </LedgerSection>
    );
  }
  if (part) {
    return (
      <LedgerSection name="selected" title="Selected" aside={partTitle(part)}>
        <PartPanel key={part.id} part={part} />
      </LedgerSection>
    );
  }
  if (wire) {
    return (
      <LedgerSection name="selected" title="Selected" aside="wire">
        <NodeOfPin pin={pinKey(wire.from)} />
      </LedgerSection>
    );
  }
  return (
    <LedgerSection name="selected" title="Selected" aside={plural(selection.parts.size + selection.wires.size, 'thing')}>
      <SeveralPanel selection={selection} />
    </LedgerSection>
  );
}

function onlyPart(state: SheetState, { parts, wires }: Selection): Part | undefined {
  const [id] = parts;
  return id === undefined || parts.size > 1 || wires.size > 0 ? undefined : partsById(state.document).get(id);
}

function onlyWire(state: SheetState, { parts, wires }: Selection): Wire | undefined {
  const [id] = wires;
  return id === undefined || wires.size > 1 || parts.size > 0 ? undefined : state.document.wires.find((wire) => wire.id === id);
}

function partTitle(part: Part): string {
  const kind = definitionOf(part.kind).name.toLowerCase();
  return part.designator === '' ? kind : `${part.designator} · ${kind}`;
}

function PartPanel({ part }: { readonly part: Part }) {
  const pin = pinsOf(part)[0];
  const isElement = definitionOf(part.kind).element !== undefined;
  return (
    <>
      <PartFields part={part} />
      {isElement && <PartReadings part={part} />}
      {!isElement && pin && <NodeOfPin pin={pinKey(pin.ref)} />}
    </>
  );
}

function NodeOfPin({ pin }: { readonly pin: string }) {
  const node = useSheet((state) => state.readings.network.nodes.byPin.get(pin));
  return node ? <NodePanel node={node} /> : null;
}
