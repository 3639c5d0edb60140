'use client';

import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField, SelectField, TextField, type Option } from '@/components/forms/fields';
import { archiveAction, emptyVesselAction, fillVesselAction } from '@/lib/register/actions';
import { archiveSchema, emptySchema, fillSchema } from '@/lib/register/schema';

export function FillForm({ cellar, vesselId, lots, today }: { cellar: string; vesselId: string; lots: Option[]; today: string }) {
  return (
    <ActionForm action={fillVesselAction} schema={fillSchema} defaults={{ fromDay: today }} submit="Fill it">
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          <HiddenField name="vesselId" value={vesselId} />
          <div className="grid-fields">
            <SelectField field={fields.lotId!} label="Lot" options={lots} blank="choose" />
            <TextField field={fields.fromDay!} label="From" type="date" />
          </div>
          <AreaField field={fields.note!} label="Note" rows={2} />
        </>
      )}
    </ActionForm>
  );
}

export function EmptyForm({ cellar, vesselId, fill, today }: { cellar: string; vesselId: string; fill: { id: string; version: number }; today: string }) {
  return (
    <ActionForm action={emptyVesselAction} schema={emptySchema} defaults={{ toDay: today }} submit="End this fill" submitButton={(isPending) => <button className="btn" disabled={isPending}>End this fill</button>}>
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          <HiddenField name="vesselId" value={vesselId} />
          <HiddenField name="fillId" value={fill.id} />
          <HiddenField name="version" value={fill.version} />
          <div className="grid-fields"><TextField field={fields.toDay!} label="Emptied on" type="date" /></div>
        </>
      )}
    </ActionForm>
  );
}

/** Puts a row away or takes it back: the one undoes the other. */
export function ArchiveForm({ cellar, kind, id, isArchived, label }: { cellar: string; kind: 'lot' | 'vessel' | 'pull'; id: string; isArchived: boolean; label?: string }) {
  const word = isArchived ? 'Restore' : 'Archive';
  return (
    <ActionForm action={archiveAction} schema={archiveSchema} submit={word} className="" submitButton={(isPending) => <button className={label ? 'link' : 'btn btn-bare'} disabled={isPending} aria-label={label && `${word} ${label}`}>{word}</button>}>
      {() => (
        <>
          <HiddenField name="cellar" value={cellar} />
          <HiddenField name="kind" value={kind} />
          <HiddenField name="id" value={id} />
          <HiddenField name="isArchived" value={isArchived ? 'no' : 'yes'} />
        </>
      )}
    </ActionForm>
  );
}
