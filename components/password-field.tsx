'use client';

import { Eye, EyeOff } from 'lucide-react';
import { useState } from 'react';
import { TextField, type TextFieldProps } from './text-field';

export type PasswordFieldProps = Omit<TextFieldProps, 'type' | 'trail' | 'autoComplete'> & {
  /** Tells a password manager whether to fill what it knows or to offer a fresh one. */
  readonly autoComplete: 'current-password' | 'new-password';
};

export function PasswordField(props: PasswordFieldProps) {
  const [shown, setShown] = useState(false);
  const Icon = shown ? EyeOff : Eye;
  return (
    <TextField
      {...props}
      type={shown ? 'text' : 'password'}
      autoCapitalize="none"
      autoCorrect="off"
      spellCheck={false}
      trail={
        <button
          type="button"
          aria-label={shown ? 'Hide the password' : 'Show the password'}
          aria-pressed={shown}
          onClick={() => setShown((was) => !was)}
          className="flex size-8 cursor-pointer items-center justify-center rounded-[5px] hover:bg-wash hover:text-ink"
        >
          <Icon size={17} strokeWidth={1.75} aria-hidden="true" />
        </button>
      }
    />
  );
}
