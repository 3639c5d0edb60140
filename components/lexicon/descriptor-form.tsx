'use client';

import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField, SelectField, TextField } from '@/components/forms/fields';
import { PHASES, SENSES } from '@/db/enums';
import { archiveDescriptorAction, saveDescriptorAction } from '@/lib/lexicon/actions';
import { archiveDescriptorSchema, descriptorSchema } from '@/lib/lexicon/schema';

const same = (values: readonly string[]) => values.map((value) => ({ value, label: value }));

export function DescriptorForm({ cellar, defaults, families, id, version }: { cellar: string; defaults: Record<string, unknown>; families: string[]; id?: string; version?: number }) {
  return (
    <ActionForm action={saveDescriptorAction} schema={descriptorSchema} defaults={defaults} submit={id ? 'Save' : 'Add the descriptor'}>
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          {id && <HiddenField name="id" value={id} />}
          {version && <HiddenField name="version" value={version} />}
          <div className="grid-fields">
            <TextField field={fields.name!} label="Word" />
            <SelectField field={fields.sense!} label="Sense" options={same(SENSES)} />
            <TextField field={fields.family!} label="Family" list={families} />
            <SelectField field={fields.phase!} label="Scored at" options={same(PHASES)} />
          </div>
          <AreaField field={fields.definition!} label="What is meant" hint="Panelists read it." rows={2} />
          <AreaField field={fields.reference!} label="Reference sample" hint="How to make it. Name allergens." rows={2} />
          <div className="grid-fields">
            <TextField field={fields.lowAnchor!} label="Left end of the line" />
            <TextField field={fields.highAnchor!} label="Right end of the line" />
          </div>
        </>
      )}
    </ActionForm>
  );
}

export function ArchiveDescriptorForm({ cellar, id, isArchived, name }: { cellar: string; id: string; isArchived: boolean; name: string }) {
  const word = isArchived ? 'Restore' : 'Archive';
  return (
    <ActionForm action={archiveDescriptorAction} schema={archiveDescriptorSchema} submit={word} className="" submitButton={(isPending) => <button className="link" disabled={isPending} aria-label={`${word} ${name}`}>{word}</button>}>
      {() => (
        <>
          <HiddenField name="cellar" value={cellar} />
          <HiddenField name="id" value={id} />
          <HiddenField name="isArchived" value={isArchived ? 'no' : 'yes'} />
        </>
      )}
    </ActionForm>
  );
}
