'use client';

import { useState } from 'react';
import { attempt } from '@/app/_client/attempt';
import { failureText } from '@/app/_client/say-failure';
import type { SnapshotListItem } from '@/app/_shared/wire';
import { takeSnapshot } from '@/app/sheets/[id]/actions';
import { Button } from '@/components/button';
import { Dialog } from '@/components/dialog';
import { TextField } from '@/components/text-field';
import type { Keeper } from '../keeping/keeper';

export type SnapshotDialogProps = {
  readonly sheetId: string;
  readonly keeper: Keeper;
  readonly onTaken: (snapshot: SnapshotListItem) => void;
  readonly onClose: () => void;
};

/** Freezes the sheet as it is shown: what is unsaved is saved first. */
export function SnapshotDialog({ sheetId, keeper, onTaken, onClose }: SnapshotDialogProps) {
  const [name, setName] = useState('');
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<string | undefined>(undefined);

  const take = async () => {
    if (busy) return;
    if (name.trim() === '') {
      setError('Give the snapshot a name.');
      return;
    }
    setBusy(true);
    const settled = await keeper.settle();
    if (!settled.ok) {
      setBusy(false);
      setError('The sheet is not saved yet, and only what is saved can be frozen. Try again when it is.');
      return;
    }
    const result = await attempt(() => takeSnapshot({ id: sheetId, revision: settled.revision, name }));
    setBusy(false);
    if (result.ok) onTaken(result.value);
    else setError(result.error.fields?.['name'] ?? failureText(result.error));
  };

  return (
    <Dialog
      open
      onClose={onClose}
      title="Take a snapshot"
      description="A frozen copy of the sheet as it is now: it never changes, and it can be looked at, cloned and restored."
      footer={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button variant="primary" type="submit" form="take-snapshot" busy={busy}>
            Take snapshot
          </Button>
        </>
      }
    >
      <form
        id="take-snapshot"
        onSubmit={(event) => {
          event.preventDefault();
          void take();
        }}
      >
        <TextField
          label="Name"
          value={name}
          maxLength={120}
          autoComplete="off"
          placeholder="Before review"
          error={error}
          reserveLine
          onChange={(event) => {
            setName(event.target.value);
            setError(undefined);
          }}
        />
      </form>
    </Dialog>
  );
}
