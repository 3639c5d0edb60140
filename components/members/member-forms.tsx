'use client';

import { useActionState } from 'react';
import { ActionForm } from '@/components/forms/action-form';
import { HiddenField, TextField, TicksField } from '@/components/forms/fields';
import { ROLES, type Role } from '@/db/enums';
import { addMemberAction, changeCellarAction, changeRolesAction, endMembershipAction, passwordLinkAction, removeDemoAction } from '@/lib/members/actions';
import { addMemberSchema, cellarSchema, changeRolesSchema, memberSchema, removeDemoSchema } from '@/lib/members/schema';
import { GuardedForm } from '@/components/ui/guarded-form';
import { ROLE_WORDS } from '@/lib/members/format';

const ROLE_OPTIONS = ROLES.map((value) => ({ value, label: ROLE_WORDS[value] }));

export function AddMemberForm({ cellar }: { cellar: string }) {
  return (
    <ActionForm action={addMemberAction} schema={addMemberSchema} submit="Add the person" saved="Added. Make a link above with which they set a password.">
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          <div className="grid-fields">
            <TextField field={fields.name!} label="Name" />
            <TextField field={fields.email!} label="E-mail address" type="email" />
          </div>
          <TicksField field={fields.roles!} label="Roles" options={ROLE_OPTIONS} />
        </>
      )}
    </ActionForm>
  );
}

export function RolesForm({ cellar, userId, roles }: { cellar: string; userId: string; roles: Role[] }) {
  return (
    <ActionForm action={changeRolesAction} schema={changeRolesSchema} defaults={{ roles }} submit="Save roles" saved="Saved." submitButton={(isPending) => <button className="btn" disabled={isPending}>Save roles</button>}>
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          <HiddenField name="userId" value={userId} />
          <TicksField field={fields.roles!} label="Roles" options={ROLE_OPTIONS} />
        </>
      )}
    </ActionForm>
  );
}

export function EndMembershipForm({ cellar, userId }: { cellar: string; userId: string }) {
  return <GuardedForm action={endMembershipAction} schema={memberSchema} submit="End membership" hidden={{ cellar, userId }}>{() => <p className="note">What the person did stays. Add them again to undo this.</p>}</GuardedForm>;
}

/** A link that sets a password, shown once. */
export function PasswordLink({ cellar, userId, hasPassword }: { cellar: string; userId: string; hasPassword: boolean }) {
  const [result, dispatch, isPending] = useActionState(passwordLinkAction, null);
  if (result?.url) {
    const { url } = result;
    return (
      <div className="saved stack tight" role="status">
        <p>Give this link to the person. It works once, for a week, and is not shown again.</p>
        <input className="input" readOnly value={url} aria-label="Password link" onFocus={(event) => event.target.select()} />
        <button type="button" className="btn" onClick={() => void navigator.clipboard?.writeText(url)}>Copy</button>
      </div>
    );
  }
  return (
    <form action={dispatch}>
      <input type="hidden" name="cellar" value={cellar} />
      <input type="hidden" name="userId" value={userId} />
      <button className="btn" disabled={isPending}>{hasPassword ? 'Link for a new password' : 'Link to set a password'}</button>
      {result?.error && <p className="error">{result.error}</p>}
    </form>
  );
}

export function CellarForm({ cellar, version, name, timeZone, zones }: { cellar: string; version: number; name: string; timeZone: string; zones: string[] }) {
  return (
    <ActionForm action={changeCellarAction} schema={cellarSchema} defaults={{ name, timeZone }} submit="Save" saved="Saved.">
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          <HiddenField name="version" value={version} />
          <div className="grid-fields">
            <TextField field={fields.name!} label="Name of the cellar" />
            <TextField field={fields.timeZone!} label="Time zone" list={zones} />
          </div>
        </>
      )}
    </ActionForm>
  );
}

export function RemoveDemoForm({ cellar, name }: { cellar: string; name: string }) {
  return (
    <GuardedForm action={removeDemoAction} schema={removeDemoSchema} submit="Remove the demo cellar" hidden={{ cellar }}>
      {(fields) => <TextField field={fields.typedName!} label={`Type “${name}”`} hint="All its invented barrels, sessions and people go. This can’t be undone." />}
    </GuardedForm>
  );
}
