'use client';

import { useEffect, useRef } from 'react';
import { useWords } from '@/components/i18n/words';

/** What is wrong with the form, in one place that takes the focus; each line leads to its field. */
export function ErrorSummary({ errors, formId }: { errors: Record<string, string[]>; formId: string }) {
  const t = useWords();
  const box = useRef<HTMLDivElement>(null);
  const lines = Object.entries(errors).flatMap(([name, texts]) => texts.map((text) => ({ name, text })));
  const key = lines.map((line) => line.name + line.text).join('|');
  useEffect(() => {
    if (key) box.current?.focus();
    // Only a new set of errors moves the focus; typing in a field must not.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [key === '']);
  if (lines.length === 0) return null;
  return (
    <div className="summary" ref={box} tabIndex={-1} role="alert">
      <ul>
        {lines.map(({ name, text }) => (
          <li key={name + text}>{name ? <a href={`#${formId}-${name}`}>{t.said(text)}</a> : t.said(text)}</li>
        ))}
      </ul>
    </div>
  );
}
