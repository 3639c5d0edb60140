'use client';

import { ActionForm } from '@/components/forms/action-form';
import { HiddenField, SelectField, TextField, TickField } from '@/components/forms/fields';
import { useWords } from '@/components/i18n/words';
import { claimSeatAction, findSessionAction, leaveSeatAction, takeSeatAction } from '@/lib/seats/actions';
import { claimSchema, joinCodeSchema, leaveSchema, takeSeatSchema } from '@/lib/seats/schema';

export function JoinCodeForm() {
  const t = useWords();
  return (
    <ActionForm action={findSessionAction} schema={joinCodeSchema} submit={t('join.find')} working={t('join.finding')}>
      {(fields) => <TextField field={fields.code!} label={t('join.digits')} inputMode="numeric" autoComplete="one-time-code" />}
    </ActionForm>
  );
}

export function ClaimForm({ joinKey, name }: { joinKey: string; name: string }) {
  const t = useWords();
  const roles = [
    { value: 'taste', label: t('join.taste') },
    { value: 'nose_only', label: t('join.noseOnly') },
  ];
  return (
    <ActionForm action={claimSeatAction} schema={claimSchema} submit={t('join.take')} working={t('join.taking')} defaults={{ displayName: name, seatRole: 'taste' }}>
      {(fields) => (
        <>
          <HiddenField name="joinKey" value={joinKey} />
          <TextField field={fields.displayName!} label={t('join.name')} hint={t('join.nameHint')} autoComplete="nickname" />
          <SelectField field={fields.seatRole!} label={t('join.role')} options={roles} />
          <TickField field={fields.isOfAge!} label={t('join.ofAge')} />
          <TickField field={fields.hasRead!} label={t('join.hasRead')} />
        </>
      )}
    </ActionForm>
  );
}

export function TakeSeatForm({ token, number }: { token: string; number: number }) {
  const t = useWords();
  return (
    <ActionForm action={takeSeatAction} schema={takeSeatSchema} submit={t('seat.take', { n: number })} working={t('seat.taking')}>
      {() => <HiddenField name="token" value={token} />}
    </ActionForm>
  );
}

export function LeaveForm({ joinKey }: { joinKey: string }) {
  const t = useWords();
  return (
    <ActionForm action={leaveSeatAction} schema={leaveSchema} submit={t('leave.leave')} working={t('leave.leaving')}>
      {() => <HiddenField name="joinKey" value={joinKey} />}
    </ActionForm>
  );
}
