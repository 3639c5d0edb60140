'use client';

import { ActionForm } from '@/components/forms/action-form';
import { HiddenField } from '@/components/forms/fields';
import { eraseNameAction } from '@/lib/sessions/actions';
import { reissueSchema } from '@/lib/sessions/schema';

/** Erases a seat's name when the person asks for it; the answers stay as evidence. */
export function EraseName({ cellar, sessionId, seat, label }: { cellar: string; sessionId: string; seat: number; label: string }) {
  return (
    <details>
      <summary className="link" aria-label={`Erase the name of seat ${label}`}>Erase name</summary>
      <ActionForm action={eraseNameAction} schema={reissueSchema} submit="Erase" className="" submitButton={(isPending) => <button className="btn" disabled={isPending}>Erase for good</button>}>
        {() => (
          <>
            <HiddenField name="cellar" value={cellar} />
            <HiddenField name="sessionId" value={sessionId} />
            <HiddenField name="seat" value={seat} />
          </>
        )}
      </ActionForm>
    </details>
  );
}
