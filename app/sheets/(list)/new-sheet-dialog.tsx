'use client';

import { useId, useState, type FormEvent } from 'react';
import { attempt } from '@/app/_client/attempt';
import { failureText } from '@/app/_client/say-failure';
import { createSheet } from '@/app/sheets/actions';
import { Button } from '@/components/button';
import { Dialog } from '@/components/dialog';
import { TextField } from '@/components/text-field';

export type NewSheetDialogProps = {
  readonly open: boolean;
  readonly onClose: () => void;
  readonly onMade: (id: string) => void;
};

export function NewSheetDialog({ open, onClose, onMade }: NewSheetDialogProps) {
  const form = useId();
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<string>();

  const close = (): void => {
    setError(undefined);
    onClose();
  };

  const submit = async (event: FormEvent<HTMLFormElement>): Promise<void> => {
    event.preventDefault();
    if (busy) return;
    const name = String(new FormData(event.currentTarget).get('name') ?? '').trim();
    if (name === '') {
      setError('Give the sheet a name.');
      return;
    }
    setBusy(true);
    const result = await attempt(() => createSheet({ name }));
    setBusy(false);
    if (!result.ok) {
      setError(result.error.fields?.name ?? failureText(result.error));
      return;
    }
    close();
    onMade(result.value.id);
  };

  return (
    <Dialog
      open={open}
      onClose={close}
      title="New sheet"
      footer={
        <>
          <Button onClick={close}>Cancel</Button>
          <Button variant="primary" type="submit" form={form} busy={busy}>
            Begin drawing
          </Button>
        </>
      }
    >
      <form id={form} noValidate onSubmit={(event) => void submit(event)}>
        <TextField
          name="name"
          label="Name"
          placeholder="Hydrophone anti-alias low-pass"
          maxLength={120}
          autoComplete="off"
          error={error}
          hint="What it is and what it is for; it can be changed at any time."
          reserveLine
          onChange={() => setError(undefined)}
        />
      </form>
    </Dialog>
  );
}
