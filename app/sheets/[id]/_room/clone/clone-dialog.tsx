'use client';

import { useState } from 'react';
import { attempt } from '@/app/_client/attempt';
import { failureText } from '@/app/_client/say-failure';
import { cloneSheet } from '@/app/sheets/actions';
import { Button } from '@/components/button';
import { Dialog } from '@/components/dialog';
import { TextField } from '@/components/text-field';

export type CloneDialogProps = {
  readonly sheetId: string;
  readonly sheetName: string;
  /** What is cloned, when it is not the sheet as it stands. */
  readonly snapshot?: { readonly id: string; readonly name: string };
  /** The document that only this machine has; null when the server has what is shown. */
  readonly unsaved: () => Promise<string | null>;
  readonly onCloned: (id: string) => void;
  readonly onClose: () => void;
};

const MOST_CHARACTERS = 120;
const SUFFIX = ' (clone)';

export function cloneName(name: string): string {
  return `${Array.from(name).slice(0, MOST_CHARACTERS - SUFFIX.length).join('')}${SUFFIX}`;
}

/** Makes a new sheet from this one, and goes there. */
export function CloneDialog({ sheetId, sheetName, snapshot, unsaved, onCloned, onClose }: CloneDialogProps) {
  const [name, setName] = useState(() => cloneName(sheetName));
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<string | undefined>(undefined);

  const clone = async () => {
    if (busy) return;
    if (name.trim() === '') {
      setError('Give the sheet a name.');
      return;
    }
    setBusy(true);
    const document = snapshot === undefined ? await unsaved() : null;
    const result = await attempt(() =>
      cloneSheet({ id: sheetId, name, snapshotId: snapshot?.id, document: document ?? undefined }),
    );
    setBusy(false);
    if (result.ok) onCloned(result.value.id);
    else setError(result.error.fields?.['name'] ?? failureText(result.error));
  };

  return (
    <Dialog
      open
      onClose={onClose}
      title={snapshot === undefined ? 'Clone this sheet' : `Clone snapshot “${snapshot.name}”`}
      description="A new sheet with this drawing. It remembers where it came from; this one stays as it is."
      footer={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button variant="primary" type="submit" form="clone-sheet" busy={busy}>
            Clone
          </Button>
        </>
      }
    >
      <form
        id="clone-sheet"
        onSubmit={(event) => {
          event.preventDefault();
          void clone();
        }}
      >
        <TextField
          label="Name of the clone"
          value={name}
          maxLength={MOST_CHARACTERS}
          autoComplete="off"
          error={error}
          reserveLine
          onFocus={(event) => event.target.select()}
          onChange={(event) => {
            setName(event.target.value);
            setError(undefined);
          }}
        />
      </form>
    </Dialog>
  );
}
