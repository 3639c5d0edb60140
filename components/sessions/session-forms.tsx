'use client';

import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField, TextField } from '@/components/forms/fields';
import { GuardedForm } from '@/components/ui/guarded-form';
import { abandonAction, closeAction, decideEarlyAction, duplicateAction, openAction, requestEarlyAction, sealAction, unsealAction } from '@/lib/sessions/actions';
import { abandonSchema, closeSchema, earlyDecisionSchema, earlyRequestSchema, sessionSchema } from '@/lib/sessions/schema';

interface Which {
  cellar: string;
  sessionId: string;
}

const hidden = ({ cellar, sessionId }: Which) => ({ cellar, sessionId });

export const SealForm = (which: Which) => <GuardedForm action={sealAction} schema={sessionSchema} submit="Seal the plan" hidden={hidden(which)} />;

export const UnsealForm = (which: Which) => <GuardedForm action={unsealAction} schema={sessionSchema} submit="Open the key" hidden={hidden(which)} />;

export function OpenForm(which: Which) {
  return (
    <ActionForm action={openAction} schema={sessionSchema} submit="Open the session">
      {() => <><HiddenField name="cellar" value={which.cellar} /><HiddenField name="sessionId" value={which.sessionId} /></>}
    </ActionForm>
  );
}

export function DuplicateForm(which: Which) {
  return (
    <ActionForm action={duplicateAction} schema={sessionSchema} submit="Plan another like it" submitButton={(isPending) => <button className="btn" disabled={isPending}>Plan another like it</button>}>
      {() => <><HiddenField name="cellar" value={which.cellar} /><HiddenField name="sessionId" value={which.sessionId} /></>}
    </ActionForm>
  );
}

export function CloseForm(which: Which) {
  return (
    <GuardedForm action={closeAction} schema={closeSchema} submit="Close session" hidden={hidden(which)}>
      {(fields) => <AreaField field={fields.reason!} label="Reason, when seats still owe answers" rows={2} />}
    </GuardedForm>
  );
}

export function AbandonForm(which: Which) {
  return (
    <GuardedForm action={abandonAction} schema={abandonSchema} submit="Abandon session" hidden={hidden(which)}>
      {(fields) => <AreaField field={fields.reason!} label="Why?" rows={2} />}
    </GuardedForm>
  );
}

export function EarlyRequestForm(which: Which) {
  return (
    <GuardedForm action={requestEarlyAction} schema={earlyRequestSchema} submit="Ask a second person" hidden={hidden(which)}>
      {(fields) => (
        <>
          <TextField field={fields.code!} label="Code of one glass" hint="Leave empty to ask for the whole session, which then closes." inputMode="numeric" />
          <AreaField field={fields.reason!} label="Reason" hint="The report says so for ever." rows={2} />
        </>
      )}
    </GuardedForm>
  );
}

export function EarlyDecisionForm({ openingId, decision, ...which }: Which & { openingId: string; decision: 'approve' | 'refuse' }) {
  const submit = decision === 'approve' ? 'Approve' : 'Refuse';
  const values = { ...hidden(which), openingId, decision };
  if (decision === 'approve') return <GuardedForm action={decideEarlyAction} schema={earlyDecisionSchema} submit={submit} hidden={values} />;
  return (
    <ActionForm action={decideEarlyAction} schema={earlyDecisionSchema} submit={submit} submitButton={(isPending) => <button className="btn" disabled={isPending}>{submit}</button>}>
      {() => <>{Object.entries(values).map(([name, value]) => <HiddenField key={name} name={name} value={value} />)}</>}
    </ActionForm>
  );
}
