'use client';

import { useState } from 'react';
import type { FieldMetadata } from '@conform-to/react';
import { TicksField } from '@/components/forms/fields';
import { useChosen } from '@/components/forms/use-chosen';
import type { ItemRule } from '@/lib/methods/types';
import type { DesignChoices } from '@/lib/sessions/types';

interface Props {
  lines: FieldMetadata<unknown>;
  flags: FieldMetadata<unknown>;
  choices: DesignChoices;
  rule: ItemRule;
}

/** Descriptors of the cellar's lexicon, by family; an aroma can be asked for in the nose, on the palate, or both. */
export function BallotPicker({ lines, flags, choices, rule }: Props) {
  const [filter, setFilter] = useState('');
  const { chosen, toggle } = useChosen(lines);
  const word = filter.trim().toLowerCase();
  return (
    <section className="stack">
      <h2>The ballot</h2>
      {rule.from === 'whole' && <p>Nothing to choose: people write, and the phone finds the words of the whole lexicon in it.</p>}
      {rule.from === 'none' && <p>One question: the overall liking, on nine points.</p>}
      {rule.from === 'chosen' && rule.asksLiking && <p className="soft">The overall liking is asked after these.</p>}
      <fieldset className="field" id={lines.id} hidden={rule.from !== 'chosen'}>
        <legend>{rule.label}</legend>
        <p className="note">{rule.hint} {chosen.size} chosen{chosen.size > rule.max && `; the first ${rule.max === 1 ? 'one counts' : `${rule.max} count`}`}.</p>
        {lines.errors && <p className="error">{lines.errors.join(' ')}</p>}
        <input className="input" type="search" placeholder="Find a descriptor" aria-label="Find a descriptor" value={filter} onChange={(event) => setFilter(event.target.value)} />
        {choices.lexicon.map(({ family, entries }) => {
          const inFamily = entries.filter((entry) => chosen.has(entry.value) || chosen.has(palateOf(entry.value))).length;
          const isShown = word === '' || family.toLowerCase().includes(word) || entries.some((entry) => entry.label.toLowerCase().includes(word));
          return (
            <details key={family} open={word !== '' || inFamily > 0} hidden={!isShown}>
              <summary className="fold">{family} {inFamily > 0 && <b>{inFamily} chosen</b>}</summary>
              <div className="grid-fields">
                {entries.map((entry) => (
                  <div key={entry.value} hidden={word !== '' && !entry.label.toLowerCase().includes(word) && !family.toLowerCase().includes(word)}>
                    <Tick name={lines.name} value={entry.value} label={entry.label} note={entry.phase} isChosen={chosen.has(entry.value)} onToggle={toggle} />
                    {entry.phase === 'nose' && <Tick name={lines.name} value={palateOf(entry.value)} label={entry.label} note="palate" isChosen={chosen.has(palateOf(entry.value))} onToggle={toggle} />}
                  </div>
                ))}
              </div>
            </details>
          );
        })}
      </fieldset>
      {rule.hasFlags && <TicksField field={flags} label="Faults to tick when noticed" options={choices.faults} />}
    </section>
  );
}

const palateOf = (line: string): string => `${line.slice(0, 36)}:palate`;

function Tick({ name, value, label, note, isChosen, onToggle }: { name: string; value: string; label: string; note: string; isChosen: boolean; onToggle(value: string): void }) {
  return (
    <label className="tick-row">
      <input type="checkbox" name={name} value={value} checked={isChosen} onChange={() => onToggle(value)} />
      <span>{label} <span className="hint">{note}</span></span>
    </label>
  );
}
