'use client';

import { useState, type KeyboardEvent } from 'react';
import { useWords } from '@/components/i18n/words';
import { Code } from '@/components/ui/code';
import { Ring } from '@/components/ui/ring';
import type { Method } from '@/db/enums';
import type { Ballot } from '@/lib/ballots/types';
import { choiceKey } from '@/lib/offline/answers';
import { COMMENT_MAX } from '@/lib/ballots/limits';
import { feel } from '@/lib/phone/feel';
import { afterRest, nextBlock, sealShort } from './flow';
import { KeptLine, Trouble } from './kept-line';
import type { SheetPart } from './sheet-part';

/**
 * One set: pick the glass, or the two, that the question is about, then lock. A locked set stays as it is
 * (ISO 4120, 7.5). With a reference the first glass can't be picked.
 */
export function PickSheet({ sheet, store, state, place, go }: SheetPart) {
  const t = useWords();
  const { block } = place;
  const ballot = sheet.ballot as Extract<Ballot, { kind: 'pick' }>;
  const method = sheet.method as PickMethod;
  const glasses = sheet.blocks.find((candidate) => candidate.block === block)!.glasses;
  const [chosen, setChosen] = useState<number[]>([]);
  const [isGuess, setGuess] = useState(false);
  const [comment, setComment] = useState('');
  const isClosed = state.sessionState !== 'open';
  const lockedOp = state.answers.get(choiceKey(block))?.op;
  const locked = lockedOp?.kind === 'choice' ? [lockedOp.position, lockedOp.also] : null;
  const set = sheet.blocks.findIndex((candidate) => candidate.block === block) + 1;
  const isWhole = chosen.length === ballot.picks;
  const trait = sheet.items[0]?.name ?? '';
  const first = ballot.hasReference ? 2 : 1;

  const toggle = (position: number) => {
    feel();
    if (ballot.picks === 1) setChosen([position]);
    else if (chosen.includes(position)) setChosen(chosen.filter((other) => other !== position));
    // A third one takes the place of the one before.
    else setChosen([...chosen.slice(-1), position]);
  };
  const onLock = async () => {
    if (!isWhole) return;
    const [position, also] = [...chosen].sort((a, b) => a - b) as [number, number?];
    const next = nextBlock(sheet, block);
    if (comment.trim()) await store.record({ kind: 'comment', block, position, text: comment.trim() });
    await store.record({ kind: 'choice', block, position, ...(also !== undefined && { also }), isGuess });
    setChosen([]);
    setGuess(false);
    setComment('');
    if (next === null) go({ ...place, view: 'review' });
    else go(afterRest(sheet, { block: next, position: 1, phase: null }));
  };
  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>) => {
    const step = event.key === 'ArrowDown' || event.key === 'ArrowRight' ? 1 : event.key === 'ArrowUp' || event.key === 'ArrowLeft' ? -1 : 0;
    if (step === 0 || isClosed || locked || ballot.picks > 1) return;
    event.preventDefault();
    const count = glasses.length - first + 1;
    const next = (((chosen[0] ?? (step > 0 ? first - 1 : first)) - first + step + count) % count) + first;
    setChosen([next]);
    event.currentTarget.querySelectorAll<HTMLButtonElement>('[role=radio]')[next - first]?.focus();
  };

  return (
    <>
      <div className="bench">
        <h1 id="ask">{t(`ask.${method}`, { trait })}</h1>
        <div className={`label ${glasses.length > 3 ? 'tags-many' : ''}`} role={ballot.picks === 1 ? 'radiogroup' : 'group'} aria-labelledby="ask" onKeyDown={onKeyDown}>
          <div className="fields">
            <span>{t('pick.setOf', { n: set, total: sheet.blocks.length })}</span>
            <span>{t('sheet.seal', { hash: sealShort(sheet) })}</span>
            <span><KeptLine state={state} /></span>
          </div>
          {glasses.map(({ position, code }) => {
            const isOn = (locked ?? chosen).includes(position);
            const parts = (
              <>
                <span className="ord">{t('pick.ordinal', { n: position })}</span>
                <Code code={code} size="l" label={t('common.codeWord')} />
              </>
            );
            if (position < first) return <div key={position} className="tag">{parts}<span className="is"><b>{t('pick.reference')}</b></span></div>;
            const shared = {
              className: `tag ${isOn ? 'on' : ''}`, disabled: isClosed || locked !== null, onClick: () => toggle(position),
              children: <>{parts}<span className="is">{isOn ? <ChosenRing /> : <Ring state="to-come" size={28} />}{isOn && t(`picked.${method}`)}</span></>,
            };
            return ballot.picks === 1 ? (
              <button key={position} type="button" role="radio" aria-checked={isOn} tabIndex={isOn || (chosen.length === 0 && position === first) ? 0 : -1} {...shared} />
            ) : (
              <button key={position} type="button" aria-pressed={isOn} {...shared} />
            );
          })}
        </div>
      </div>
      {!locked && !isClosed && (
        <>
          {ballot.asksGuess && <label className="tick"><input type="checkbox" checked={isGuess} onChange={(event) => setGuess(event.target.checked)} />{t('pick.guess')}</label>}
          <details className="item">
            <summary className="tick" style={{ padding: 0 }}>{t('pick.how')}</summary>
            <textarea className="input" aria-label={t('pick.howLabel')} rows={2} maxLength={COMMENT_MAX} value={comment} onChange={(event) => setComment(event.target.value)} />
          </details>
          <p className="rest"><span><b>{t('pick.order')}</b><br /><span className="soft">{t('pick.again')}</span></span></p>
        </>
      )}
      <footer className="foot-bar">
        <Trouble state={state} store={store} joinKey={sheet.joinKey} place={place} go={go} />
        {locked ? (
          <button type="button" className="btn btn-main wide" onClick={() => go({ ...place, view: 'review' })}>{t('pick.goOn')}</button>
        ) : (
          <>
            <p className="say">{isWhole ? t('pick.stays') : t(`choose.${method}`)}</p>
            <button type="button" className="btn btn-main wide" disabled={!isWhole || isClosed} onClick={() => void onLock()}>{t('pick.lock', { n: set })}</button>
          </>
        )}
      </footer>
    </>
  );
}

/** Methods that are answered by picking, each with its own question. */
type PickMethod = Extract<Method, 'triangle' | 'tetrad' | 'duo_trio' | 'duo_trio_constant' | 'directional_pair' | 'preference' | 'two_of_five'>;

function ChosenRing() {
  return (
    <svg width="28" height="28" viewBox="0 0 28 28" aria-hidden>
      <path d="M25.99 13.58A12 12 0 1 1 14.42 2.01" fill="none" stroke="currentColor" strokeWidth={2.5} />
    </svg>
  );
}
