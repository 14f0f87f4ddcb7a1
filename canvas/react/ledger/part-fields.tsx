'use client';

import { checkField, setDesignator } from '../../commands/edits/values';
import type { Part } from '../../document/types';
import type { FieldDefinition } from '../../parts/definition';
import { readFrequency } from '../../parts/read-values';
import { definitionOf } from '../../parts/registry';
import { echoField } from '../figures/echo';
import { Segmented } from '../figures/segmented';
import { useSheet, useSheetStore } from '../sheet-context';
import { commitDesignator, commitValues } from './commit';
import { ValueField } from './value-field';

/** Every field of a part: its main one large, the rest in lines below it, its designator last. */
export function PartFields({ part }: { readonly part: Part }) {
  const { fields } = definitionOf(part.kind);
  const [main, ...rest] = fields;
  const frequency = readFrequency(part.values['frequency'] ?? '');
  const isDirect = frequency.ok && frequency.value === 0;
  return (
    <div className="flex flex-col gap-1.5">
      {main && <PartField part={part} field={main} main />}
      {rest.map((field) => (
        <PartField key={field.key} part={part} field={field} />
      ))}
      {isDirect && (
        <p className="text-[12.5px] leading-[17px] text-muted">
          Direct current: the amplitude is the direct value, and the phase has no part in it.
        </p>
      )}
      {part.designator !== '' && <DesignatorField part={part} />}
    </div>
  );
}

type PartFieldProps = { readonly part: Part; readonly field: FieldDefinition; readonly main?: boolean };

function PartField({ part, field, main = false }: PartFieldProps) {
  const store = useSheetStore();
  const mayEdit = useSheet((state) => state.mayEdit);
  const value = part.values[field.key] ?? '';
  const what = part.designator === '' ? 'the node name' : part.designator;
  const commit = (text: string, shown: string) => {
    // “Set VS1 to sine” says it; a phase needs its name.
    const saysItself = main || field.type === 'choice';
    const label = saysItself ? `Set ${what} to ${shown}` : `Set ${field.label.toLowerCase()} of ${what} to ${shown}`;
    commitValues(store, part.id, { [field.key]: text }, label);
  };
  switch (field.type) {
    case 'choice':
      return (
        <FieldLine label={field.label}>
          <Segmented
            label={field.label}
            options={field.options}
            value={value}
            disabled={!mayEdit}
            onValueChange={(chosen) => commit(chosen, field.options.find((option) => option.value === chosen)?.label ?? chosen)}
          />
        </FieldLine>
      );
    case 'frequency':
      return <SourceFrequency part={part} field={field} />;
    case 'quantity':
    case 'angle':
    case 'nodeName':
      return (
        <ValueField
          label={field.label}
          value={value}
          size={main ? 'large' : 'row'}
          readOnly={!mayEdit}
          owner={what}
          check={(text) => checkField(field, text)}
          echo={(text) => echoField(field, text)}
          onCommit={(text) => commit(text, echoField(field, text) || text)}
        />
      );
  }
}

function FieldLine({ label, children }: { readonly label: string; readonly children: React.ReactNode }) {
  return (
    <div className="flex min-h-7 flex-wrap items-center justify-between gap-x-3">
      <span aria-hidden="true" className="text-[13px] text-muted">
        {label}
      </span>
      {children}
    </div>
  );
}

type SourceFrequencyProps = { readonly part: Part; readonly field: Extract<FieldDefinition, { type: 'frequency' }> };

/** The operating frequency, or one of the source's own: empty stands for the first. */
function SourceFrequency({ part, field }: SourceFrequencyProps) {
  const store = useSheetStore();
  const mayEdit = useSheet((state) => state.mayEdit);
  const value = part.values[field.key] ?? '';
  const own = value !== '';
  const set = (text: string, words: string) =>
    commitValues(store, part.id, { [field.key]: text }, `Set frequency of ${part.designator} to ${words}`);
  return (
    <>
      <FieldLine label={field.label}>
        <Segmented
          label={field.label}
          options={[
            { value: 'operating', label: 'operating' },
            { value: 'own', label: 'its own' },
          ]}
          value={own ? 'own' : 'operating'}
          disabled={!mayEdit}
          onValueChange={(chosen) => {
            const { operatingFrequency } = store.getState().document;
            if (chosen === 'own') set(operatingFrequency, operatingFrequency);
            else set('', 'the operating frequency');
          }}
        />
      </FieldLine>
      {own && (
        <ValueField
          label="In Hz or rad/s"
          value={value}
          readOnly={!mayEdit}
          owner={part.designator}
          check={(text) => checkField(field, text)}
          echo={(text) => echoField(field, text)}
          onCommit={(text) => set(text, text === '' ? 'the operating frequency' : echoField(field, text))}
        />
      )}
    </>
  );
}

function DesignatorField({ part }: { readonly part: Part }) {
  const store = useSheetStore();
  const mayEdit = useSheet((state) => state.mayEdit);
  return (
    <ValueField
      label="Designator"
      value={part.designator}
      readOnly={!mayEdit}
      owner="the part"
      check={(text) => {
        const result = setDesignator(store.getState().document, part.id, text);
        return result.ok ? null : result.message;
      }}
      onCommit={(text) => commitDesignator(store, part, text)}
    />
  );
}
