'use client';

import { ActionForm } from '@/components/forms/action-form';
import { HiddenField, TextField } from '@/components/forms/fields';
import { signInAction } from '@/lib/auth/actions';
import { signInSchema } from '@/lib/auth/schema';

export function SignInForm({ next }: { next: string }) {
  return (
    <ActionForm action={signInAction} schema={signInSchema} submit="Sign in" working="Signing in…">
      {(fields) => (
        <>
          <HiddenField name="next" value={next} />
          <TextField field={fields.email!} label="E-mail address" type="email" autoComplete="username" />
          <TextField field={fields.password!} label="Password" type="password" autoComplete="current-password" />
        </>
      )}
    </ActionForm>
  );
}
