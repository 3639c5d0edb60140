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

const CODING_CHOICES = [
  { value: 'pourer', label: 'A pourer, who does not taste' },
  { value: 'two_step', label: 'Nobody: two people in two steps, and both may taste' },
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
  const [isTwoStep, setTwoStep] = useState(defaults.coding === 'two_step');
  const facts = choices.methods.find((candidate) => candidate.method === method)!;
  const { min, max } = facts.sampleCount;
  const isSets = facts.unit === 'set';
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
              <SelectField field={fields.method!} label="Method" options={choices.methods.map((choice) => ({ value: choice.method, label: `${choice.name}: ${choice.answers.charAt(0).toLowerCase()}${choice.answers.slice(1)}` }))} />
            </div>
          </section>
          <section className="stack">
            <h2>What panelists read</h2>
            <TextField field={fields.title!} label="Title" hint="Neutral: “Wednesday tasting”, no barrel, no lot." />
            <AreaField field={fields.instruction!} label="Instruction" hint="Neutral too." />
          </section>
          <section className="stack">
            <h2>The samples</h2>
            <PullPicker field={fields.pulls!} label={min === max ? 'Two pulls' : `${min === 1 ? 'One' : min === 2 ? 'Two' : 'Three'} to ${max} pulls`} pulls={choices.pulls} />
            {choices.pulls.length === 0 && <p className="caution">No pull is recorded yet. Open a barrel and record one; it then stands here.</p>}
            <TextField field={fields.controlLabel!} label="A control from outside the cellar" hint="Its label only, if there is one." />
          </section>
          {facts.items && <BallotPicker lines={fields.lines!} flags={fields.flags!} choices={choices} rule={facts.items} />}
          <section className="stack">
            <h2>The serving</h2>
            <div className="grid-fields">
              <TextField field={fields.seatsPlanned!} label="Seats" type="number" inputMode="numeric" />
              <TextField field={fields.reservesPlanned!} label="Reserve seats" type="number" inputMode="numeric" hint="Sealed in the same plan." />
              <TextField field={fields.replicates!} label={isSets ? 'Sets for each seat' : 'Times each is tasted'} type="number" inputMode="numeric" hint={isSets ? 'One is the standard’s.' : 'Two or three show repeatability.'} />
              <TextField field={fields.servingVolumeMl!} label="Serving, mL" type="number" inputMode="numeric" />
              <TextField field={fields.servingTemperatureC!} label="Temperature, °C" type="number" inputMode="decimal" step="0.1" hint="White 10–12, red 15–18 (common practice)." />
              <TextField field={fields.restS!} label="Rest between, s" type="number" inputMode="numeric" hint="60–90 for tannin (common practice)." />
              <TextField field={fields.alpha!} label="Risk of a false “different”, α" type="number" inputMode="decimal" step="any" hint="0.05 is usual." />
            </div>
            <TicksField field={fields.allergens!} label="Allergens in what is served" hint="Shown to everybody before they taste. Crackers and reference samples count." options={ALLERGENS.map((value) => ({ value, label: ALLERGEN_WORDS[value] }))} />
            <Needs formId={form.id} pulls={choices.pulls} facts={facts} />
          </section>
          <section className="stack">
            <h2>The people</h2>
            <div className="grid-fields">
              <SelectField field={fields.leaderId!} label="Leader" options={choices.members} />
              <TextField field={fields.scheduledFor!} label="When" type="datetime-local" />
            </div>
            <div onChange={(event) => setTwoStep((event.target as unknown as HTMLSelectElement).value === 'two_step')}>
              <SelectField field={fields.coding!} label="Who knows the key?" options={CODING_CHOICES} />
            </div>
            <div hidden={isTwoStep}><TicksField field={fields.pourers!} label="Who pours?" hint="A pourer may read the key and does not taste in this session." options={choices.members} /></div>
            <details open={isTwoStep}>
              <summary className="fold">Two-step coding</summary>
              <div className="stack pt-3">
                <p className="soft">One person fills lettered bottles and sees no code; another marks letters with codes and sees no barrel. Both may taste. For flights, not for sets of glasses.</p>
                <div className="grid-fields">
                  <SelectField field={fields.letteredBy!} label="Fills the lettered bottles" options={[{ value: '', label: 'Choose' }, ...choices.members]} />
                  <SelectField field={fields.codedBy!} label="Marks letters with codes" options={[{ value: '', label: 'Choose' }, ...choices.members]} />
                </div>
              </div>
            </details>
          </section>
        </>
      )}
    </ActionForm>
  );
}
