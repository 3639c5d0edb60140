'use client';

import { useEffect, useState } from 'react';
import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField, SelectField, TextField, TickField } from '@/components/forms/fields';
import { recordPullAction } from '@/lib/register/actions';
import { DRAW_WORDS, optionsOf } from '@/lib/register/format';
import { pullSchema } from '@/lib/register/schema';

const WAIT_S = 60;

/** The clean pull, step by step in the order of the work. */
export function PullForm({ cellar, vesselId, vessel, at }: { cellar: string; vesselId: string; vessel: string; at: string }) {
  return (
    <ActionForm action={recordPullAction} schema={pullSchema} defaults={{ pulledAt: at, drawMethod: 'thief', volumeMl: 300, evaporationS: WAIT_S }} submit={`Record the pull from ${vessel}`}>
      {(fields) => (
        <>
          <HiddenField name="cellar" value={cellar} />
          <HiddenField name="vesselId" value={vesselId} />
          <p className="caution"><b>70 % alcohol catches fire near room temperature.</b> No sulfur wick, torch or hot lamp nearby. CO₂ and SO₂ gather in closed rooms and are not always smelled: air the room, never lean into a gassed vessel, and follow your local code.</p>
          <ol className="stack">
            <li className="stack tight">
              <SelectField field={fields.drawMethod!} label="1. How is it drawn?" options={optionsOf(DRAW_WORDS)} />
              <TickField field={fields.isSanitised!} label="2. Tool and bung or nail sanitised" hint="Rinse with 70 % alcohol, then with the wine; touch nothing with it (common practice)." />
            </li>
            <li className="stack tight">
              <EvaporationTimer />
              <TextField field={fields.evaporationS!} label="3. Seconds waited for the alcohol to evaporate" hint="At least 30: alcohol left in the tool spoils the sample (common practice)." type="number" inputMode="numeric" />
            </li>
            <li className="stack tight">
              <TickField field={fields.isVented!} label="4. Vented gently" hint="Ease the bung slowly: the barrel may have drawn a vacuum, or push gas." />
              <SelectField field={fields.isHissHeard!} label="Did it hiss?" options={[{ value: 'yes', label: 'It hissed' }, { value: 'no', label: 'No hiss' }]} blank="not noticed" />
            </li>
            <li className="grid-fields">
              <TextField field={fields.volumeMl!} label="5. Drawn, mL" hint="From mid-depth." type="number" inputMode="numeric" />
              <TextField field={fields.temperatureC!} label="Temperature, °C" type="number" inputMode="decimal" step="0.1" />
              <TextField field={fields.pulledAt!} label="When" type="datetime-local" />
            </li>
            <li className="stack tight">
              <TickField field={fields.isResealed!} label="6. Sealed again, with a clean nail or bung" />
              <TickField field={fields.isToppedUp!} label="7. Topped up" />
              <TextField field={fields.toppedWith!} label="Topped with" hint="Matched wine; say which." />
              <TickField field={fields.isWiped!} label="8. Wiped" />
            </li>
          </ol>
          <AreaField field={fields.note!} label="Note" hint="Colour, haze, smell at the bung." />
        </>
      )}
    </ActionForm>
  );
}

/** Counts the wait down; the number of seconds stays to be entered by hand. */
function EvaporationTimer() {
  const [left, setLeft] = useState<number | null>(null);
  useEffect(() => {
    if (left === null || left <= 0) return;
    const timer = setTimeout(() => setLeft(left - 1), 1000);
    return () => clearTimeout(timer);
  }, [left]);
  return (
    <p className="row wrap">
      <button type="button" className="btn" onClick={() => setLeft(WAIT_S)}>{left === null ? `Start the ${WAIT_S} s wait` : 'Start again'}</button>
      <span role="timer" aria-live="off">{left === null ? '' : left > 0 ? <b>{left} s</b> : <b className="live">Now it may be drawn</b>}</span>
    </p>
  );
}
