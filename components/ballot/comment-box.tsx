'use client';

import { useState } from 'react';
import { COMMENT_MAX } from '@/lib/ballots/schema';
import type { KeptState } from '@/lib/offline/answers';
import { KEPT_WORDS } from './words';

/** A remark on one glass; kept when the field is left. */
export function CommentBox({ id, label, text, kept, onKeep }: { id: string; label: string; text: string; kept: KeptState | null; onKeep(text: string): void }) {
  const [typed, setTyped] = useState(text);
  return (
    <div className="item field">
      <label htmlFor={id}>{label} <span className="hint">{typed === text && kept ? KEPT_WORDS[kept] : ''}</span></label>
      <textarea id={id} className="input" rows={2} maxLength={COMMENT_MAX} value={typed} onChange={(event) => setTyped(event.target.value)} onBlur={() => typed !== text && onKeep(typed)} />
    </div>
  );
}
