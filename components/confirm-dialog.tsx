'use client';

import type { ReactNode } from 'react';
import { Button } from './button';
import { Dialog } from './dialog';

export type ConfirmDialogProps = {
  readonly open: boolean;
  readonly onClose: () => void;
  readonly onConfirm: () => void;
  /** The question, naming the thing: “Remove Tarik Rahimi from the team?” */
  readonly title: string;
  /** What happens then, and whether there is a way back. */
  readonly description: ReactNode;
  /** The verb of the question, on the button. */
  readonly confirmLabel: string;
  readonly danger?: boolean;
  readonly busy?: boolean;
};

/** Asks before something with no way back; the focus starts on the button that changes nothing. */
export function ConfirmDialog({
  open,
  onClose,
  onConfirm,
  title,
  description,
  confirmLabel,
  danger = false,
  busy = false,
}: ConfirmDialogProps) {
  return (
    <Dialog
      open={open}
      onClose={onClose}
      role="alertdialog"
      title={title}
      description={description}
      footer={
        <>
          <Button onClick={onClose} data-autofocus="">
            Cancel
          </Button>
          <Button variant={danger ? 'danger' : 'primary'} busy={busy} onClick={onConfirm}>
            {confirmLabel}
          </Button>
        </>
      }
    />
  );
}
