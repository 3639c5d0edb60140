'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { useWords } from '@/components/i18n/words';
import type { SheetItem } from '@/lib/ballots/types';
import { commentKey, faultKey, scoreKey } from '@/lib/offline/answers';
import type { SheetState } from '@/lib/offline/store';
import { CommentBox } from './comment-box';
import { FineSteps } from './fine-steps';
import { afterRest, codeAt, linesOf, nextGlass, phasesOf, sealShort } from './flow';
import { GlassLabel } from './glass-label';
import { KeptLine, Trouble } from './kept-line';
import { LineScale } from './line-scale';
import { phaseWord } from './words';
import type { SheetPart } from './sheet-part';

/** Keys and fine steps come in bursts: the last of a burst is what is kept. */
const BURST_MS = 250;

/** One part of one glass: the code, its lines, the way on. */
export function ProfileSheet({ sheet, store, state, place, go }: SheetPart) {
  const t = useWords();
  const { block, position } = place;
  const phase = place.phase ?? phasesOf(sheet)[0]!;
  const phases = phasesOf(sheet);
  const part = phases.indexOf(phase);
  const items = linesOf(sheet).filter((item) => item.phase === phase);
  const lines = items.filter((item) => item.kind === 'line');
  const flags = items.filter((item) => item.kind === 'flag');
  const isClosed = state.sessionState !== 'open';
  const [touched, setTouched] = useState<number | null>(null);
  const [draft, setDraft] = useState<{ item: number; value: number } | null>(null);
  /** What the touched line was before its last burst, for Undo. */
  const [before, setBefore] = useState<{ item: number; value: number | null } | null>(null);
  const burst = useRef<ReturnType<typeof setTimeout>>(undefined);

  const keptValue = (item: number): number | null => {
    const op = state.answers.get(scoreKey(block, position, item))?.op;
    return op?.kind === 'score' ? op.value : null;
  };
  const valueOf = (line: SheetItem): number | null => (draft?.item === line.item ? draft.value : keptValue(line.item));
  const keep = (item: number, value: number) => {
    setDraft(null);
    void store.record({ kind: 'score', block, position, item, value });
  };
  const set = (item: number, value: number) => {
    clearTimeout(burst.current);
    if (draft && draft.item !== item) keep(draft.item, draft.value);
    setTouched(item);
    if (draft?.item !== item) setBefore({ item, value: keptValue(item) });
    setDraft({ item, value });
    burst.current = setTimeout(() => keep(item, value), BURST_MS);
  };
  const settle = () => {
    clearTimeout(burst.current);
    if (draft) keep(draft.item, draft.value);
  };
  const clear = (item: number) => {
    clearTimeout(burst.current);
    setBefore({ item, value: draft?.item === item ? draft.value : keptValue(item) });
    setDraft(null);
    void store.record({ kind: 'clear', block, position, item });
  };
  const undo = (last: { item: number; value: number | null }) => {
    clearTimeout(burst.current);
    setBefore(null);
    setDraft(null);
    if (last.value === null) void store.record({ kind: 'clear', block, position, item: last.item });
    else keep(last.item, last.value);
  };

  const touch = (item: number) => {
    if (draft && draft.item !== item) settle();
    setTouched(item);
  };
  const acts = useRef({ set, clear, touch });
  useEffect(() => {
    acts.current = { set, clear, touch };
  });
  const onSet = useCallback((item: number, value: number) => acts.current.set(item, value), []);
  const onClear = useCallback((item: number) => acts.current.clear(item), []);
  const onTouch = useCallback((item: number) => acts.current.touch(item), []);

  const untouched = lines.filter((line) => valueOf(line) === null).length;
  const glasses = sheet.blocks.find((candidate) => candidate.block === block)!.glasses;
  const active = lines.find((line) => line.item === touched);
  const activeValue = active ? valueOf(active) : null;
  const onNext = () => {
    settle();
    const nextPhase = phases[part + 1];
    if (nextPhase) return go({ ...place, phase: nextPhase });
    const next = nextGlass(sheet, place);
    if (!next) return go({ ...place, view: 'review' });
    go(afterRest(sheet, { ...next, phase: phases[0]! }));
  };
  const onBack = () => {
    settle();
    if (part > 0) return go({ ...place, phase: phases[part - 1]! });
    go({ ...place, position: position - 1, phase: phases.at(-1)! });
  };
  const backWord = part > 0 ? phaseWord(t, phases[part - 1]!) : position > 1 ? t('sheet.glass', { n: position - 1 }) : null;
  const nextWord = phases[part + 1] ? t('sheet.next', { part: phaseWord(t, phases[part + 1]!).toLowerCase() }) : nextGlass(sheet, place) ? t('sheet.glassDone') : t('sheet.lookOver');

  return (
    <>
      <GlassLabel
        fields={[sheet.blocks.length > 1 ? t('sheet.flightOf', { n: block, total: sheet.blocks.length }) : t('sheet.flight'), t('sheet.glassOf', { n: position, total: glasses.length }), t('sheet.seal', { hash: sealShort(sheet) })]}
        code={codeAt(sheet, block, position)} done={position - 1} total={glasses.length} foot={<KeptLine state={state} isDrafting={draft !== null} />}
      />
      <div className="phase">
        <h1>{phaseWord(t, phase)}</h1>
        <span className="soft">{t('sheet.partOf', { n: part + 1, total: phases.length })}{untouched > 0 && `, ${t('sheet.linesLeft', { n: untouched })}`}</span>
      </div>
      <Trouble state={state} store={store} joinKey={sheet.joinKey} place={place} go={go} />
      {lines.map((line) => (
        <LineScale
          key={`${block}/${position}/${line.item}`} line={line} value={valueOf(line)} isActive={touched === line.item} isClosed={isClosed}
          kept={draft?.item === line.item ? 'saving' : (state.answers.get(scoreKey(block, position, line.item))?.state ?? null)}
          onSet={onSet} onClear={onClear} onTouch={onTouch}
        />
      ))}
      {flags.length > 0 && (
        <fieldset className="item field">
          <legend className="legend">{t('sheet.faults')}</legend>
          {flags.map((flag) => {
            const op = state.answers.get(faultKey(block, position, flag.item))?.op;
            const isNoted = op?.kind === 'fault' && op.isNoted;
            return (
              <label key={flag.item} className="tick-row">
                <input type="checkbox" checked={isNoted} disabled={isClosed} onChange={() => void store.record({ kind: 'fault', block, position, item: flag.item, isNoted: !isNoted })} />
                <span>{flag.name} <span className="hint">{flag.definition}</span></span>
              </label>
            );
          })}
        </fieldset>
      )}
      {part === phases.length - 1 && !isClosed && (
        <CommentBox
          key={`${block}/${position}`} id="comment" label={t('sheet.comment')}
          text={textOf(state, commentKey(block, position))} kept={state.answers.get(commentKey(block, position))?.state ?? null}
          onKeep={(text) => void store.record({ kind: 'comment', block, position, text })}
        />
      )}
      <footer className="foot-bar">
        {active && (activeValue !== null || before?.item === active.item) && !isClosed && (
          <FineSteps
            name={active.name} value={activeValue ?? 50} onStep={(value) => set(active.item, value)} onClear={() => clear(active.item)}
            onUndo={before?.item === active.item ? () => undo(before) : null}
          />
        )}
        <div className="acts">
          {backWord && <button type="button" className="btn" onClick={onBack}>{backWord}</button>}
          <button type="button" className="btn btn-main" onClick={onNext}>{nextWord}</button>
        </div>
      </footer>
    </>
  );
}

function textOf(state: SheetState, key: string): string {
  const op = state.answers.get(key)?.op;
  return op?.kind === 'comment' ? op.text : '';
}
