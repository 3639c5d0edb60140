'use client';

import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField, SelectField, TextField } from '@/components/forms/fields';
import { saveLotAction } from '@/lib/register/actions';
import { DRINK_WORDS, optionsOf } from '@/lib/register/format';
import { lotSchema } from '@/lib/register/schema';

/** A lot, new or changed. */
export function LotForm({ cellar, defaults, id, version }: { cellar: string; defaults: Record<string, unknown>; id?: string; version?: number }) {
  return (
    <ActionForm action={saveLotAction} schema={lotSchema} defaults={defaults} submit={id ? 'Save' : 'Add the lot'}>
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          {id && <HiddenField name="id" value={id} />}
          {version && <HiddenField name="version" value={version} />}
          <div className="grid-fields">
            <TextField field={fields.code!} label="Code" hint="Short, as on the barrel." />
            <TextField field={fields.name!} label="Name" />
            <SelectField field={fields.drink!} label="Drink" options={optionsOf(DRINK_WORDS)} />
            <TextField field={fields.vintage!} label="Vintage" type="number" inputMode="numeric" />
          </div>
          <AreaField field={fields.note!} label="Note" />
        </>
      )}
    </ActionForm>
  );
}
