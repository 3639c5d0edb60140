'use client';

import { ActionForm } from '@/components/forms/action-form';
import { AreaField, HiddenField } from '@/components/forms/fields';
import { withdrawCallAction } from '@/lib/calls/actions';
import { withdrawCallSchema } from '@/lib/calls/schema';

/** Takes a call back; it folds open so that the reason is written before the button is met. */
export function WithdrawForm({ cellar, callId }: { cellar: string; callId: string }) {
  return (
    <details>
      <summary className="link">Take this call back</summary>
      <div className="pt-3">
        <ActionForm action={withdrawCallAction} schema={withdrawCallSchema} submit="Take it back">
          {(fields) => (
            <>
              <HiddenField name="cellar" value={cellar} />
              <HiddenField name="call" value={callId} />
              <AreaField field={fields.reason!} label="Why it is taken back" hint="The call stays on record, with this reason beside it." rows={2} />
            </>
          )}
        </ActionForm>
      </div>
    </details>
  );
}
