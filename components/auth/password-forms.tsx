'use client';

import { ActionForm } from '@/components/forms/action-form';
import { HiddenField, TextField } from '@/components/forms/fields';
import { changePasswordAction, setPasswordAction } from '@/lib/auth/actions';
import { changePasswordSchema, setPasswordSchema } from '@/lib/auth/schema';

const HINT = 'At least 12 characters. Three or four unrelated words do well.';

export function SetPasswordForm({ token }: { token: string }) {
  return (
    <ActionForm action={setPasswordAction} schema={setPasswordSchema} submit="Set password and sign in">
      {(fields) => (
        <>
          <HiddenField name="token" value={token} />
          <TextField field={fields.password!} label="New password" hint={HINT} type="password" autoComplete="new-password" />
        </>
      )}
    </ActionForm>
  );
}

export function ChangePasswordForm() {
  return (
    <ActionForm action={changePasswordAction} schema={changePasswordSchema} submit="Change password" saved="Password changed. Your other sign-ins were ended.">
      {(fields) => (
        <>
          <TextField field={fields.current!} label="Present password" type="password" autoComplete="current-password" />
          <TextField field={fields.password!} label="New password" hint={HINT} type="password" autoComplete="new-password" />
        </>
      )}
    </ActionForm>
  );
}
