'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { signUp } from '../actions';
import { FormFoot } from '../form-foot';
import { attempt } from '@/app/_client/attempt';
import { loadPage } from '@/app/_client/load-page';
import { failureText } from '@/app/_client/say-failure';
import { signInWithPassword } from '@/app/_client/session';
import { signUpInput } from '@/app/_shared/wire';
import { Button } from '@/components/button';
import { PasswordField } from '@/components/password-field';
import { TextField } from '@/components/text-field';

const FIELDS = ['name', 'team', 'email', 'password'] as const;

export function SignUpForm({ next }: { readonly next: string }) {
  const [refusal, setRefusal] = useState<string>();
  const [leaving, setLeaving] = useState(false);
  const { register, handleSubmit, formState, setError } = useForm({
    resolver: zodResolver(signUpInput),
    defaultValues: { name: '', team: '', email: '', password: '' },
    mode: 'onTouched',
  });

  const submit = handleSubmit(async (input) => {
    setRefusal(undefined);
    const result = await attempt(() => signUp(input));
    if (!result.ok) {
      const told = FIELDS.filter((field) => result.error.fields?.[field] !== undefined);
      told.forEach((field, index) =>
        setError(field, { message: result.error.fields?.[field] }, { shouldFocus: index === 0 }),
      );
      if (told.length === 0) setRefusal(failureText(result.error));
      return;
    }
    setLeaving(true);
    const outcome = await signInWithPassword(input.email, input.password);
    // The account is there; if only the signing in failed, that page says why and tries again.
    loadPage(outcome.ok ? next : `/sign-in?next=${encodeURIComponent(next)}`);
  });

  const busy = formState.isSubmitting || leaving;
  return (
    <form method="post" noValidate onSubmit={(event) => void submit(event)} className="mt-5 flex flex-col gap-1">
      <TextField
        {...register('name')}
        label="Your name"
        autoComplete="name"
        maxLength={80}
        controlSize="large"
        error={formState.errors.name?.message}
        reserveLine
      />
      <TextField
        {...register('team')}
        label="Team"
        autoComplete="organization"
        maxLength={80}
        controlSize="large"
        error={formState.errors.team?.message}
        reserveLine
      />
      <TextField
        {...register('email')}
        label="E-mail"
        type="email"
        inputMode="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
        controlSize="large"
        error={formState.errors.email?.message}
        reserveLine
      />
      <FormFoot refusal={refusal}>
        <PasswordField
          {...register('password')}
          label="Password"
          autoComplete="new-password"
          controlSize="large"
          hint={refusal === undefined ? 'At least 10 characters.' : undefined}
          error={formState.errors.password?.message}
        />
      </FormFoot>
      <Button type="submit" variant="primary" size="large" busy={busy}>
        {busy ? 'Making the account' : 'Make the account'}
      </Button>
    </form>
  );
}
