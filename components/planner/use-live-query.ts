'use client';

import { useRef, useState, type FormEvent } from 'react';
import { queryOf, type Query } from '@/lib/planner/schema';

/**
 * A GET form that is read while it is filled in. Without JavaScript its button sends it; with it, the
 * address follows what is typed (the other forms' fields stay), and the button goes to the answer.
 */
export function useLiveQuery(initial: Query) {
  const [query, setQuery] = useState<Query>(initial);
  const answer = useRef<HTMLDivElement>(null);
  const onInput = (event: FormEvent<HTMLFormElement>) => {
    const form = event.currentTarget;
    const now = queryOf(new FormData(form));
    setQuery(now);
    const address = new URLSearchParams(window.location.search);
    for (const name of ownNames(form)) {
      const value = now[name];
      if (typeof value === 'string') address.set(name, value);
      else address.delete(name);
    }
    window.history.replaceState(null, '', `?${address}`);
  };
  const onSubmit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    onInput(event);
    answer.current?.focus();
  };
  return { query, form: { onInput, onSubmit }, answer };
}

/** Names of the form's fields, without those that it only carries along for the other forms. */
const ownNames = (form: HTMLFormElement): string[] =>
  [...form.elements].filter((element) => !('kept' in (element as HTMLElement).dataset)).map((element) => (element as HTMLInputElement).name).filter(Boolean);
