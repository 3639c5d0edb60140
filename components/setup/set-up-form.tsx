'use client';

import { ActionForm } from '@/components/forms/action-form';
import { HiddenField, SelectField, TextField } from '@/components/forms/fields';
import { setUpAction } from '@/lib/setup/actions';
import { setUpSchema } from '@/lib/setup/schema';

const drinks = setUpSchema.shape.drink.options.map((drink) => ({ value: drink, label: drink[0]!.toUpperCase() + drink.slice(1) }));

/** The first cellar and its owner in one form. */
export function SetUpForm({ token, timeZones, timeZone }: { token: string; timeZones: readonly string[]; timeZone: string }) {
  return (
    <ActionForm action={setUpAction} schema={setUpSchema} defaults={{ timeZone, drink: 'wine' }} submit="Make the cellar" working="Making the cellar…">
      {(fields) => (
        <>
          <HiddenField name="token" value={token} />
          <TextField field={fields.cellarName!} label="Name of the cellar" autoComplete="organization" />
          <SelectField field={fields.drink!} label="What it ages" hint="Each lot can say otherwise later." options={drinks} />
          <TextField field={fields.timeZone!} label="Time zone" hint="Days and hours are shown in it." list={timeZones} />
          <TextField field={fields.name!} label="Your name" autoComplete="name" />
          <TextField field={fields.email!} label="Your e-mail address" hint="You sign in with it." type="email" autoComplete="username" />
          <TextField field={fields.password!} label="Password" hint="At least 12 characters. Three or four unrelated words do well." type="password" autoComplete="new-password" />
        </>
      )}
    </ActionForm>
  );
}
