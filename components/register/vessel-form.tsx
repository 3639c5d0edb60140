'use client';

import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField, SelectField, TextField } from '@/components/forms/fields';
import { saveVesselAction } from '@/lib/register/actions';
import { GRAIN_WORDS, optionsOf, TOAST_WORDS, VESSEL_WORDS } from '@/lib/register/format';
import { vesselSchema } from '@/lib/register/schema';

/** A vessel, new or changed. */
export function VesselForm({ cellar, defaults, id, version }: { cellar: string; defaults: Record<string, unknown>; id?: string; version?: number }) {
  return (
    <ActionForm action={saveVesselAction} schema={vesselSchema} defaults={defaults} submit={id ? 'Save' : 'Add the vessel'}>
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          {id && <HiddenField name="id" value={id} />}
          {version && <HiddenField name="version" value={version} />}
          <div className="grid-fields">
            <TextField field={fields.name!} label="Name or number" hint="What stands on its head." />
            <SelectField field={fields.kind!} label="Kind" options={optionsOf(VESSEL_WORDS)} />
            <TextField field={fields.volumeL!} label="Volume, L" type="number" inputMode="decimal" step="any" />
            <TextField field={fields.location!} label="Where it lies" />
          </div>
          <div className="grid-fields">
            <TextField field={fields.cooper!} label="Cooper" />
            <TextField field={fields.woodSpecies!} label="Wood species" list={['Quercus petraea', 'Quercus robur', 'Quercus alba', 'Robinia pseudoacacia', 'Castanea sativa']} />
            <TextField field={fields.woodOrigin!} label="Origin of the wood" />
            <SelectField field={fields.grain!} label="Grain" options={optionsOf(GRAIN_WORDS)} blank="not known" />
            <SelectField field={fields.toast!} label="Toast" options={optionsOf(TOAST_WORDS)} blank="not known" />
            <TextField field={fields.year!} label="Year made" type="number" inputMode="numeric" />
          </div>
          <AreaField field={fields.note!} label="Note" />
        </>
      )}
    </ActionForm>
  );
}
