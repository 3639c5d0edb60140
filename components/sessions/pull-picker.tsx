'use client';

import type { FieldMetadata } from '@conform-to/react';
import { useState } from 'react';
import { useChosen } from '@/components/forms/use-chosen';

/** The newest pulls in a short window, with a filter; what is ticked stays in view. */
export function PullPicker({ field, label, pulls }: { field: FieldMetadata<unknown>; label: string; pulls: { value: string; label: string }[] }) {
  const [filter, setFilter] = useState('');
  const { chosen, toggle } = useChosen(field);
  const words = filter.toLowerCase().split(/\s+/).filter(Boolean);
  return (
    <fieldset className="field" id={field.id} aria-describedby={`${field.id}-hint`}>
      <legend>{label}</legend>
      <p className="note" id={`${field.id}-hint`}>One sample for each; {chosen.size} chosen. Which of them gets which code is drawn at sealing.</p>
      {field.errors && <p className="error" id={field.errorId}>{field.errors.join(' ')}</p>}
      <input className="input" type="search" placeholder="Find a barrel, lot or day" aria-label="Find a pull" value={filter} onChange={(event) => setFilter(event.target.value)} />
      <div className="pick" tabIndex={0} role="group" aria-label="Pulls">
        <div className="grid-fields">
          {pulls.map((pull) => (
            <label key={pull.value} className="tick-row" hidden={!chosen.has(pull.value) && !words.every((word) => pull.label.toLowerCase().includes(word))}>
              <input type="checkbox" name={field.name} value={pull.value} checked={chosen.has(pull.value)} onChange={() => toggle(pull.value)} />
              <span>{pull.label}</span>
            </label>
          ))}
        </div>
      </div>
    </fieldset>
  );
}
