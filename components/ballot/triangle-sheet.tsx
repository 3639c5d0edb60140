'use client';

import { useState, type KeyboardEvent } from 'react';
import { Code } from '@/components/ui/code';
import { Ring } from '@/components/ui/ring';
import { choiceKey } from '@/lib/offline/answers';
import { COMMENT_MAX } from '@/lib/ballots/schema';
import { nextBlock } from './flow';
import { KeptLine, Trouble } from './kept-line';
import type { SheetPart } from './sheet-part';

const ORDINALS = ['1st', '2nd', '3rd'];

/** One set of three: choose the one that differs, then lock. A locked set stays as it is (ISO 4120, 7.5). */
export function TriangleSheet({ sheet, store, state, place, go }: SheetPart) {
  const { block } = place;
  const glasses = sheet.blocks.find((candidate) => candidate.block === block)!.glasses;
  const [chosen, setChosen] = useState<number | null>(null);
  const [isGuess, setGuess] = useState(false);
  const [comment, setComment] = useState('');
  const isClosed = state.sessionState !== 'open';
  const locked = state.answers.get(choiceKey(block))?.op;
  const set = sheet.blocks.findIndex((candidate) => candidate.block === block) + 1;

  const onLock = async () => {
    if (chosen === null) return;
    const next = nextBlock(sheet, block);
    if (comment.trim()) await store.record({ kind: 'comment', block, position: chosen, text: comment.trim() });
    await store.record({ kind: 'choice', block, position: chosen, isGuess });
    setChosen(null);
    setGuess(false);
    setComment('');
    if (next === null) go({ ...place, view: 'review' });
    else go({ view: sheet.restS > 0 ? 'rest' : 'glass', block: next, position: 1, phase: null, restUntil: Date.now() + sheet.restS * 1000 });
  };
  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>) => {
    const step = event.key === 'ArrowDown' || event.key === 'ArrowRight' ? 1 : event.key === 'ArrowUp' || event.key === 'ArrowLeft' ? -1 : 0;
    if (step === 0 || isClosed) return;
    event.preventDefault();
    const next = (((chosen ?? (step > 0 ? 0 : 1)) - 1 + step + 3) % 3) + 1;
    setChosen(next);
    event.currentTarget.querySelectorAll<HTMLButtonElement>('[role=radio]')[next - 1]?.focus();
  };

  return (
    <>
      <div className="bench">
        <h1 id="ask">Two are the same.<br />Which one is different?</h1>
        <div className="label" role="radiogroup" aria-labelledby="ask" onKeyDown={onKeyDown}>
          <div className="fields">
            <span>Set {set} of {sheet.blocks.length}</span>
            <span>Seal {sheet.commitment.slice(0, 4)} {sheet.commitment.slice(4, 8)}</span>
            <span><KeptLine state={state} /></span>
          </div>
          {glasses.map(({ position, code }) => {
            const isOn = locked?.kind === 'choice' ? locked.position === position : chosen === position;
            return (
              <button
                key={position} type="button" role="radio" aria-checked={isOn} className={`tag ${isOn ? 'on' : ''}`} disabled={isClosed || locked !== undefined}
                tabIndex={isOn || (chosen === null && position === 1) ? 0 : -1} onClick={() => setChosen(position)}
              >
                <span className="ord">{ORDINALS[position - 1]}</span>
                <Code code={code} size="l" />
                <span className="is">{isOn ? <ChosenRing /> : <Ring state="to-come" size={28} />}{isOn && 'different'}</span>
              </button>
            );
          })}
        </div>
      </div>
      <Trouble state={state} store={store} joinKey={sheet.joinKey} />
      {!locked && !isClosed && (
        <>
          <label className="tick"><input type="checkbox" checked={isGuess} onChange={(event) => setGuess(event.target.checked)} />It was a guess</label>
          <details className="item">
            <summary className="tick" style={{ padding: 0 }}>Say how it differs</summary>
            <textarea className="input" aria-label="How does it differ?" rows={2} maxLength={COMMENT_MAX} value={comment} onChange={(event) => setComment(event.target.value)} />
          </details>
          <p className="rest"><span><b>Taste from the top. Spit each time.</b><br /><span className="soft">You may taste again before you lock.</span></span></p>
        </>
      )}
      <footer className="foot-bar">
        {locked ? (
          <button type="button" className="btn btn-main wide" onClick={() => go({ ...place, view: 'review' })}>Go on</button>
        ) : (
          <>
            <p className="say">{chosen === null ? 'Choose the glass that differs; guess if you can’t tell.' : 'Once locked, this set stays as it is.'}</p>
            <button type="button" className="btn btn-main wide" disabled={chosen === null || isClosed} onClick={() => void onLock()}>Lock set {set}</button>
          </>
        )}
      </footer>
    </>
  );
}

function ChosenRing() {
  return (
    <svg width="28" height="28" viewBox="0 0 28 28" aria-hidden>
      <path d="M25.99 13.58A12 12 0 1 1 14.42 2.01" fill="none" stroke="currentColor" strokeWidth={2.5} />
    </svg>
  );
}
