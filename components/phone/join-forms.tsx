'use client';

import { ActionForm } from '@/components/forms/action-form';
import { HiddenField, SelectField, TextField, TickField } from '@/components/forms/fields';
import { claimSeatAction, findSessionAction, leaveSeatAction, takeSeatAction } from '@/lib/seats/actions';
import { claimSchema, joinCodeSchema, leaveSchema, takeSeatSchema } from '@/lib/seats/schema';

export function JoinCodeForm() {
  return (
    <ActionForm action={findSessionAction} schema={joinCodeSchema} submit="Find the session" working="Looking…">
      {(fields) => <TextField field={fields.code!} label="Six digits from the board" inputMode="numeric" autoComplete="one-time-code" />}
    </ActionForm>
  );
}

const ROLES = [
  { value: 'taste', label: 'I taste, and spit' },
  { value: 'nose_only', label: 'I smell and look only' },
];

export function ClaimForm({ joinKey, name }: { joinKey: string; name: string }) {
  return (
    <ActionForm action={claimSeatAction} schema={claimSchema} submit="Take a seat" working="Finding a seat…" defaults={{ displayName: name, seatRole: 'taste' }}>
      {(fields) => (
        <>
          <HiddenField name="joinKey" value={joinKey} />
          <TextField field={fields.displayName!} label="Your name" hint="A nickname will do. It is kept apart from your answers." autoComplete="nickname" />
          <SelectField field={fields.seatRole!} label="How do you take part?" options={ROLES} />
          <TickField field={fields.isOfAge!} label="I am of legal drinking age here." />
          <TickField field={fields.hasRead!} label="I have read the list above; I spit, and I may leave without a reason." />
        </>
      )}
    </ActionForm>
  );
}

export function TakeSeatForm({ token, number }: { token: string; number: number }) {
  return (
    <ActionForm action={takeSeatAction} schema={takeSeatSchema} submit={`Take seat ${number} on this phone`} working="Moving the seat…">
      {() => <HiddenField name="token" value={token} />}
    </ActionForm>
  );
}

export function LeaveForm({ joinKey }: { joinKey: string }) {
  return (
    <ActionForm action={leaveSeatAction} schema={leaveSchema} submit="Leave the session" working="Leaving…">
      {() => <HiddenField name="joinKey" value={joinKey} />}
    </ActionForm>
  );
}
