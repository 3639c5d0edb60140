'use client';

import { useRef, useState, type MouseEvent, type ReactNode } from 'react';
import { ActionForm } from '@/components/forms/action-form';
import type { Fields } from '@/components/forms/action-form';
import type { FormResult } from '@/lib/form-action';
import type { z } from 'zod';

const HOLD_MS = 2000;
/** Two presses closer than this are one slip. */
const BREATH_MS = 700;

interface Props<Schema extends z.ZodObject> {
  action: (previous: FormResult, data: FormData) => Promise<FormResult>;
  schema: Schema;
  /** What the button says: "Close session". */
  submit: string;
  /** Said inside the guard, once it is lifted. */
  children?: (fields: Fields) => ReactNode;
  hidden: Record<string, string | number>;
}

/**
 * A step that can't be undone: the guard is lifted first, then the button is held for two seconds.
 * Who can't hold (keyboard, screen reader, a hand that shakes) presses twice, with a breath between.
 * Without JavaScript one press after lifting does it.
 */
export function GuardedForm<Schema extends z.ZodObject>({ action, schema, submit, children, hidden }: Props<Schema>) {
  return (
    <details className="guarded">
      <summary className="guard"><span className="btn">Lift the guard</span></summary>
      <div style={{ paddingTop: 'var(--s-3)' }}>
        <ActionForm action={action} schema={schema} submit={submit} working="One moment…" submitButton={(isPending) => <HoldButton isPending={isPending} label={submit} />}>
          {(fields) => (
            <>
              {Object.entries(hidden).map(([name, value]) => <input key={name} type="hidden" name={name} value={value} />)}
              {children?.(fields)}
            </>
          )}
        </ActionForm>
      </div>
    </details>
  );
}

function HoldButton({ isPending, label }: { isPending: boolean; label: string }) {
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const armedAt = useRef(0);
  const [isHeld, setHeld] = useState(false);
  const [isArmed, setArmed] = useState(false);
  const release = () => {
    clearTimeout(timer.current);
    setHeld(false);
  };
  const press = (event: { currentTarget: HTMLButtonElement }) => {
    const button = event.currentTarget;
    setHeld(true);
    timer.current = setTimeout(() => {
      setHeld(false);
      button.form?.requestSubmit();
    }, HOLD_MS);
  };
  const onClick = (event: MouseEvent<HTMLButtonElement>) => {
    if (isArmed && event.timeStamp - armedAt.current > BREATH_MS) return;
    event.preventDefault();
    if (isArmed) return;
    armedAt.current = event.timeStamp;
    setArmed(true);
  };
  return (
    <button className={`btn btn-main hold ${isHeld ? 'held' : ''}`} disabled={isPending} onPointerDown={press} onPointerUp={release} onPointerLeave={release} onPointerCancel={release} onClick={onClick} onBlur={() => setArmed(false)}>
      {isPending ? 'One moment…' : isArmed ? `Press again: ${label.toLowerCase()}` : isHeld ? `${label}: keep holding…` : `${label} (hold two seconds)`}
    </button>
  );
}
