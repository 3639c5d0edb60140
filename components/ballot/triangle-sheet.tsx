'use client';

import { useState, type KeyboardEvent } from 'react';
import { useWords } from '@/components/i18n/words';
import { Code } from '@/components/ui/code';
import { Ring } from '@/components/ui/ring';
import { choiceKey } from '@/lib/offline/answers';
import { COMMENT_MAX } from '@/lib/ballots/limits';
import { feel } from '@/lib/phone/feel';
import { afterRest, nextBlock, sealShort } from './flow';
import { KeptLine, Trouble } from './kept-line';
import type { SheetPart } from './sheet-part';

/** One set of three: choose the one that differs, then lock. A locked set stays as it is (ISO 4120, 7.5). */
export function TriangleSheet({ sheet, store, state, place, go }: SheetPart) {
  const t = useWords();
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
    else go(afterRest(sheet, { block: next, position: 1, phase: null }));
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
        <h1 id="ask">{t('triangle.ask')}</h1>
        <div className="label" role="radiogroup" aria-labelledby="ask" onKeyDown={onKeyDown}>
          <div className="fields">
            <span>{t('triangle.setOf', { n: set, total: sheet.blocks.length })}</span>
            <span>{t('sheet.seal', { hash: sealShort(sheet) })}</span>
            <span><KeptLine state={state} /></span>
          </div>
          {glasses.map(({ position, code }) => {
            const isOn = locked?.kind === 'choice' ? locked.position === position : chosen === position;
            return (
              <button
                key={position} type="button" role="radio" aria-checked={isOn} className={`tag ${isOn ? 'on' : ''}`} disabled={isClosed || locked !== undefined}
                tabIndex={isOn || (chosen === null && position === 1) ? 0 : -1} onClick={() => {
                  feel();
                  setChosen(position);
                }}
              >
                <span className="ord">{t('triangle.ordinal', { n: position })}</span>
                <Code code={code} size="l" label={t('common.codeWord')} />
                <span className="is">{isOn ? <ChosenRing /> : <Ring state="to-come" size={28} />}{isOn && t('triangle.different')}</span>
              </button>
            );
          })}
        </div>
      </div>
      <Trouble state={state} store={store} joinKey={sheet.joinKey} place={place} go={go} />
      {!locked && !isClosed && (
        <>
          <label className="tick"><input type="checkbox" checked={isGuess} onChange={(event) => setGuess(event.target.checked)} />{t('triangle.guess')}</label>
          <details className="item">
            <summary className="tick" style={{ padding: 0 }}>{t('triangle.how')}</summary>
            <textarea className="input" aria-label={t('triangle.howLabel')} rows={2} maxLength={COMMENT_MAX} value={comment} onChange={(event) => setComment(event.target.value)} />
          </details>
          <p className="rest"><span><b>{t('triangle.order')}</b><br /><span className="soft">{t('triangle.again')}</span></span></p>
        </>
      )}
      <footer className="foot-bar">
        {locked ? (
          <button type="button" className="btn btn-main wide" onClick={() => go({ ...place, view: 'review' })}>{t('triangle.goOn')}</button>
        ) : (
          <>
            <p className="say">{chosen === null ? t('triangle.choose') : t('triangle.stays')}</p>
            <button type="button" className="btn btn-main wide" disabled={chosen === null || isClosed} onClick={() => void onLock()}>{t('triangle.lock', { n: set })}</button>
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
