'use client';

import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField, SelectField, TextField } from '@/components/forms/fields';
import { createCallAction } from '@/lib/calls/actions';
import { CALL_CAUTIONS, CALL_WORDS, NEXT_DAY_WORDS } from '@/lib/calls/format';
import { createCallSchema } from '@/lib/calls/schema';
import type { CallDraft } from '@/lib/calls/types';

type Kind = keyof typeof CALL_WORDS;
const KINDS = Object.keys(CALL_WORDS) as Kind[];
const isKind = (value: unknown): value is Kind => KINDS.includes(value as Kind);

/** "Record the call": what, on which barrel, why, and when somebody looks again. */
export function CallForm({ cellar, draft }: { cellar: string; draft: CallDraft }) {
  return (
    <ActionForm action={createCallAction} schema={createCallSchema} submit="Record the call" defaults={{ fill: draft.fillId ?? '' }}>
      {(fields) => {
        const kind = fields.kind!.value;
        const caution = isKind(kind) ? CALL_CAUTIONS[kind] : null;
        return (
          <>
            <HiddenField name="cellar" value={cellar} />
            {draft.session && <HiddenField name="session" value={draft.session.id} />}
            <SelectField field={fields.fill!} label="Barrel" blank="Choose a barrel" options={draft.options.map((o) => ({ value: o.fillId, label: o.label }))} />
            <SelectField field={fields.kind!} label="What is to be done" blank="Choose" options={KINDS.map((value) => ({ value, label: CALL_WORDS[value] }))} />
            {caution && <p className="caution" role="status">{caution}</p>}
            <noscript>
              <p className="caution">{CALL_CAUTIONS.treat}</p>
            </noscript>
            <AreaField field={fields.reasons!} label="Reasons" hint="What was tasted, what was measured, what speaks against it. A score alone decides nothing." />
            <TextField field={fields.nextDay!} type="date" label={isKind(kind) ? NEXT_DAY_WORDS[kind] : 'Next date'} hint="The day on which somebody acts or looks again. A hold needs one." />
          </>
        );
      }}
    </ActionForm>
  );
}
