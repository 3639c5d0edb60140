'use client';

import { useRef, useState } from 'react';
import type { SheetItem } from '@/lib/ballots/types';
import { commentKey, faultKey, scoreKey } from '@/lib/offline/answers';
import type { SheetState } from '@/lib/offline/store';
import { CommentBox } from './comment-box';
import { FineSteps } from './fine-steps';
import { codeAt, linesOf, nextGlass, phasesOf } from './flow';
import { GlassLabel } from './glass-label';
import { KeptLine, Trouble } from './kept-line';
import { LineScale } from './line-scale';
import { PHASE_WORDS } from './words';
import type { SheetPart } from './sheet-part';

/** Keys and fine steps come in bursts: the last of a burst is what is kept. */
const BURST_MS = 250;

/** One part of one glass: the code, its lines, the way on. */
export function ProfileSheet({ sheet, store, state, place, go }: SheetPart) {
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
  const burst = useRef<ReturnType<typeof setTimeout>>(undefined);

  const valueOf = (line: SheetItem): number | null => {
    if (draft?.item === line.item) return draft.value;
    const op = state.answers.get(scoreKey(block, position, line.item))?.op;
    return op?.kind === 'score' ? op.value : null;
  };
  const keep = (item: number, value: number) => {
    setDraft(null);
    void store.record({ kind: 'score', block, position, item, value });
  };
  const set = (item: number, value: number) => {
    clearTimeout(burst.current);
    setDraft({ item, value });
    burst.current = setTimeout(() => keep(item, value), BURST_MS);
  };
  const settle = () => {
    clearTimeout(burst.current);
    if (draft) keep(draft.item, draft.value);
  };
  const clear = (item: number) => {
    clearTimeout(burst.current);
    setDraft(null);
    void store.record({ kind: 'clear', block, position, item });
  };

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
    go({ view: sheet.restS > 0 ? 'rest' : 'glass', ...next, phase: phases[0]!, restUntil: Date.now() + sheet.restS * 1000 });
  };
  const onBack = () => {
    settle();
    if (part > 0) return go({ ...place, phase: phases[part - 1]! });
    go({ ...place, position: position - 1, phase: phases.at(-1)! });
  };
  const backWord = part > 0 ? PHASE_WORDS[phases[part - 1]!] : position > 1 ? `Glass ${position - 1}` : null;
  const nextWord = phases[part + 1] ? `Next: ${PHASE_WORDS[phases[part + 1]!].toLowerCase()}` : nextGlass(sheet, place) ? 'Glass done' : 'Look over';

  return (
    <>
      <GlassLabel
        fields={[sheet.blocks.length > 1 ? `Flight ${block} of ${sheet.blocks.length}` : 'Flight 1', `Glass ${position} of ${glasses.length}`, `Seal ${sheet.commitment.slice(0, 4)} ${sheet.commitment.slice(4, 8)}`]}
        code={codeAt(sheet, block, position)} done={position - 1} total={glasses.length} foot={<KeptLine state={state} />}
      />
      <div className="phase">
        <h1>{PHASE_WORDS[phase]}</h1>
        <span className="soft">part {part + 1} of {phases.length}{untouched > 0 && `, ${untouched} ${untouched === 1 ? 'line' : 'lines'} left`}</span>
      </div>
      <Trouble state={state} store={store} joinKey={sheet.joinKey} />
      {lines.map((line) => (
        <LineScale
          key={`${block}/${position}/${line.item}`} line={line} value={valueOf(line)} isActive={touched === line.item} isClosed={isClosed}
          kept={draft?.item === line.item ? 'saving' : (state.answers.get(scoreKey(block, position, line.item))?.state ?? null)}
          onSet={(value) => set(line.item, value)} onClear={() => clear(line.item)}
          onTouch={() => {
            if (draft && draft.item !== line.item) settle();
            setTouched(line.item);
          }}
        />
      ))}
      {flags.length > 0 && (
        <fieldset className="item field">
          <legend className="legend">Do you notice a fault?</legend>
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
          key={`${block}/${position}`} id="comment" label="Anything else in this glass?"
          text={textOf(state, commentKey(block, position))} kept={state.answers.get(commentKey(block, position))?.state ?? null}
          onKeep={(text) => void store.record({ kind: 'comment', block, position, text })}
        />
      )}
      <footer className="foot-bar">
        {active && activeValue !== null && !isClosed && <FineSteps name={active.name} value={activeValue} onStep={(value) => set(active.item, value)} onClear={() => clear(active.item)} />}
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
