'use client';

import { useState } from 'react';
import { useWords } from '@/components/i18n/words';
import { COMMENT_MAX } from '@/lib/ballots/limits';
import type { KeptState } from '@/lib/offline/answers';
import { keptWord } from './words';

/** A remark on one glass; kept when the field is left. */
export function CommentBox({ id, label, text, kept, onKeep }: { id: string; label: string; text: string; kept: KeptState | null; onKeep(text: string): void }) {
  const t = useWords();
  const [typed, setTyped] = useState(text);
  return (
    <div className="item field">
      <label htmlFor={id}>{label} <span className="hint">{typed === text && kept ? keptWord(t, kept) : ''}</span></label>
      <textarea id={id} className="input" rows={2} maxLength={COMMENT_MAX} value={typed} onChange={(event) => setTyped(event.target.value)} onBlur={() => typed !== text && onKeep(typed)} />
    </div>
  );
}
