'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import * as z from 'zod/mini';
import { FormFoot } from '../form-foot';
import { loadPage } from '@/app/_client/load-page';
import { signInWithPassword } from '@/app/_client/session';
import { emailSchema } from '@/app/_shared/wire';
import { Button } from '@/components/button';
import { PasswordField } from '@/components/password-field';
import { TextField } from '@/components/text-field';

const schema = z.object({
  email: emailSchema,
  // Not the rules of a new password: an old one may be from before them.
  password: z.string().check(z.minLength(1, 'Type your password.'), z.maxLength(200, 'A password has at most 200 characters.')),
});

export type SignInFormProps = {
  /** Where to go then; a path of this site. */
  readonly next: string;
  /** Why an earlier try, told by the page's address, was refused. */
  readonly refusal?: string;
};

export function SignInForm({ next, refusal: firstRefusal }: SignInFormProps) {
  const [refusal, setRefusal] = useState(firstRefusal);
  const [leaving, setLeaving] = useState(false);
  const { register, handleSubmit, formState, setFocus } = useForm({
    resolver: zodResolver(schema),
    defaultValues: { email: '', password: '' },
    mode: 'onTouched',
  });

  const submit = handleSubmit(async ({ email, password }) => {
    setRefusal(undefined);
    const outcome = await signInWithPassword(email, password);
    if (!outcome.ok) {
      setRefusal(outcome.message);
      setFocus('password', { shouldSelect: true });
      return;
    }
    setLeaving(true);
    // A full load: every server component then sees the session, and the browser offers to keep the password.
    loadPage(next);
  });

  return (
    <form method="post" noValidate onSubmit={(event) => void submit(event)} className="mt-5 flex flex-col gap-1.5">
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
          autoComplete="current-password"
          controlSize="large"
          error={formState.errors.password?.message}
        />
      </FormFoot>
      <Button type="submit" variant="primary" size="large" busy={formState.isSubmitting || leaving}>
        {formState.isSubmitting || leaving ? 'Signing in' : 'Sign in'}
      </Button>
    </form>
  );
}
