'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { changePassword } from './actions';
import { attempt } from '@/app/_client/attempt';
import { sayFailure } from '@/app/_client/say-failure';
import { changePasswordInput } from '@/app/_shared/wire';
import { Button } from '@/components/button';
import { PasswordField } from '@/components/password-field';
import { toast } from '@/components/toast';

const FIELDS = ['current', 'next'] as const;

/** `email` is told to the password manager, so that it changes the right entry. */
export function PasswordForm({ email }: { readonly email: string }) {
  const { register, handleSubmit, formState, setError, reset } = useForm({
    resolver: zodResolver(changePasswordInput),
    defaultValues: { current: '', next: '' },
  });

  const submit = handleSubmit(async (input) => {
    const result = await attempt(() => changePassword(input));
    if (result.ok) {
      reset();
      toast.done('Your password is changed. Every other session of yours has ended.');
      return;
    }
    const told = FIELDS.filter((field) => result.error.fields?.[field] !== undefined);
    told.forEach((field, index) =>
      setError(field, { message: result.error.fields?.[field] }, { shouldFocus: index === 0 }),
    );
    if (told.length === 0) sayFailure(result.error);
  });

  return (
    <form method="post" noValidate onSubmit={(event) => void submit(event)} className="flex max-w-90 flex-col gap-1">
      <input name="username" autoComplete="username" value={email} readOnly className="hidden" />
      <PasswordField
        {...register('current')}
        label="Present password"
        autoComplete="current-password"
        error={formState.errors.current === undefined ? undefined : (formState.errors.current.message ?? 'Type it.')}
        reserveLine
      />
      <PasswordField
        {...register('next')}
        label="New password"
        autoComplete="new-password"
        hint="At least 10 characters."
        error={formState.errors.next?.message}
        reserveLine
      />
      <div className="mt-3">
        <Button type="submit" variant="primary" busy={formState.isSubmitting}>
          Change the password
        </Button>
      </div>
    </form>
  );
}
