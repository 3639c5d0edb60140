'use client';

import type { FieldMetadata } from '@conform-to/react';
import { useState } from 'react';

/** The values of a list field that are ticked, kept while the list is filtered. */
export function useChosen(field: FieldMetadata<unknown>): { chosen: ReadonlySet<string>; toggle(value: string): void } {
  const [chosen, setChosen] = useState(() => new Set<string>(Array.isArray(field.initialValue) ? (field.initialValue as string[]) : field.initialValue ? [String(field.initialValue)] : []));
  const toggle = (value: string) =>
    setChosen((before) => {
      const after = new Set(before);
      if (!after.delete(value)) after.add(value);
      return after;
    });
  return { chosen, toggle };
}
