'use client';

import { useState } from 'react';
import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField, SelectField, TextField, TicksField } from '@/components/forms/fields';
import { ALLERGENS, type Method } from '@/db/enums';
import { ALLERGEN_WORDS } from '@/lib/seats/allergens';
import { saveDraftAction } from '@/lib/sessions/actions';
import { draftSchema } from '@/lib/sessions/schema';
import type { DesignChoices } from '@/lib/sessions/types';
import { BallotPicker } from './ballot-picker';
import { Needs } from './needs';
import { PullPicker } from './pull-picker';

const METHODS = [
  { value: 'profile', label: 'Profile: what do they taste like, and how much of it?' },
  { value: 'triangle', label: 'Triangle: is there a difference at all?' },
];

interface Props {
  cellar: string;
  choices: DesignChoices;
  defaults: Record<string, unknown>;
  sessionId?: string;
  version?: number;
}

/** The whole design on one page, in the order in which a leader thinks of it. */
export function DesignForm({ cellar, choices, defaults, sessionId, version }: Props) {
  const [method, setMethod] = useState(defaults.method as Method);
  const isProfile = method === 'profile';
  return (
    <ActionForm action={saveDraftAction} schema={draftSchema} defaults={defaults} submit="Save the draft" className="stack wide-gap">
      {(fields, form) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          {sessionId && <HiddenField name="sessionId" value={sessionId} />}
          {version && <HiddenField name="version" value={version} />}
          <section className="stack">
            <h2>The question</h2>
            <AreaField field={fields.privateQuestion!} label="What does the cellar want to know?" hint="Private: nobody who tastes gets it before the key is open." rows={2} />
            <div onChange={(event) => setMethod((event.target as unknown as HTMLSelectElement).value as Method)}>
              <SelectField field={fields.method!} label="Method" options={METHODS} />
            </div>
          </section>
          <section className="stack">
            <h2>What panelists read</h2>
            <TextField field={fields.title!} label="Title" hint="Neutral: “Wednesday tasting”, no barrel, no lot." />
            <AreaField field={fields.instruction!} label="Instruction" hint="Neutral too." />
          </section>
          <section className="stack">
            <h2>The samples</h2>
            <PullPicker field={fields.pulls!} label={isProfile ? 'Two to twelve pulls' : 'Two pulls'} pulls={choices.pulls} />
            {choices.pulls.length === 0 && <p className="caution">No pull is recorded yet. Open a barrel and record one; it then stands here.</p>}
            <TextField field={fields.controlLabel!} label="A control from outside the cellar" hint="Its label only, if there is one." />
          </section>
          {isProfile && <BallotPicker lines={fields.lines!} flags={fields.flags!} choices={choices} />}
          <section className="stack">
            <h2>The serving</h2>
            <div className="grid-fields">
              <TextField field={fields.seatsPlanned!} label="Seats" type="number" inputMode="numeric" />
              <TextField field={fields.reservesPlanned!} label="Reserve seats" type="number" inputMode="numeric" hint="Sealed in the same plan." />
              <TextField field={fields.replicates!} label={isProfile ? 'Times each is tasted' : 'Sets for each seat'} type="number" inputMode="numeric" hint={isProfile ? 'Two or three show repeatability.' : 'One is the standard’s.'} />
              <TextField field={fields.servingVolumeMl!} label="Serving, mL" type="number" inputMode="numeric" />
              <TextField field={fields.servingTemperatureC!} label="Temperature, °C" type="number" inputMode="decimal" step="0.1" hint="White 10–12, red 15–18 (common practice)." />
              <TextField field={fields.restS!} label="Rest between, s" type="number" inputMode="numeric" hint="60–90 for tannin (common practice)." />
              <TextField field={fields.alpha!} label="Risk of a false “different”, α" type="number" inputMode="decimal" step="any" hint="0.05 is usual." />
            </div>
            <TicksField field={fields.allergens!} label="Allergens in what is served" hint="Shown to everybody before they taste. Crackers and reference samples count." options={ALLERGENS.map((value) => ({ value, label: ALLERGEN_WORDS[value] }))} />
            <Needs formId={form.id} pulls={choices.pulls} />
          </section>
          <section className="stack">
            <h2>The people</h2>
            <div className="grid-fields">
              <SelectField field={fields.leaderId!} label="Leader" options={choices.members} />
              <TextField field={fields.scheduledFor!} label="When" type="datetime-local" />
            </div>
            <TicksField field={fields.pourers!} label="Who pours?" hint="A pourer may read the key and does not taste in this session." options={choices.members} />
          </section>
        </>
      )}
    </ActionForm>
  );
}
