'use client';

import { useWords } from '@/components/i18n/words';
import { OWED_KINDS, type SheetItem } from '@/lib/ballots/types';
import { commentKey, faultKey, scoreKey } from '@/lib/offline/answers';
import type { SheetState } from '@/lib/offline/store';
import { CommentBox } from './comment-box';
import { FineSteps } from './fine-steps';
import { afterRest, codeAt, linesOf, nextGlass, phasesOf, sealShort } from './flow';
import { GlassLabel } from './glass-label';
import { KeptLine, Trouble } from './kept-line';
import { LineScale } from './line-scale';
import { PointScale, type PointKind } from './point-scale';
import type { SheetPart } from './sheet-part';
import { useLineDraft } from './use-line-draft';
import { phaseWord } from './words';

const POINT_KINDS: Record<Exclude<PointKind, 'term'>, true> = { category: true, rate: true, just_right: true, liking: true };

/** One part of one glass: the code, its lines, the way on. */
export function ProfileSheet({ sheet, store, state, place, go }: SheetPart) {
  const t = useWords();
  const { block, position } = place;
  const phase = place.phase ?? phasesOf(sheet)[0]!;
  const phases = phasesOf(sheet);
  const part = phases.indexOf(phase);
  const items = linesOf(sheet).filter((item) => item.phase === phase);
  const owed = items.filter((item) => OWED_KINDS.includes(item.kind));
  const lines = items.filter((item) => item.kind === 'line');
  const checks = items.filter((item) => item.kind === 'check');
  const points = items.filter((item): item is SheetItem & { kind: PointKind } => item.kind in POINT_KINDS);
  const flags = items.filter((item) => item.kind === 'flag');
  const isClosed = state.sessionState !== 'open';
  const { draft, touched, before, acts } = useLineDraft(store, block, position);

  const valueOf = (line: SheetItem): number | null => {
    if (draft?.item === line.item) return draft.value;
    const op = state.answers.get(scoreKey(block, position, line.item))?.op;
    return op?.kind === 'score' ? op.value : null;
  };

  const setPoint = (item: SheetItem, value: number) => void store.record({ kind: 'score', block, position, item: item.item, value });
  const untouched = owed.filter((line) => valueOf(line) === null).length;
  const glasses = sheet.blocks.find((candidate) => candidate.block === block)!.glasses;
  const active = lines.find((line) => line.item === touched);
  const activeValue = active ? valueOf(active) : null;
  const onNext = () => {
    acts.settle();
    const nextPhase = phases[part + 1];
    if (nextPhase) return go({ ...place, phase: nextPhase });
    const next = nextGlass(sheet, place);
    if (!next) return go({ ...place, view: 'review' });
    go(afterRest(sheet, { ...next, phase: phases[0]! }));
  };
  const onBack = () => {
    acts.settle();
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
      {lines.map((line) => (
        <LineScale
          key={`${block}/${position}/${line.item}`} line={line} value={valueOf(line)} isActive={touched === line.item} isClosed={isClosed}
          kept={draft?.item === line.item ? 'saving' : (state.answers.get(scoreKey(block, position, line.item))?.state ?? null)}
          onSet={acts.set} onClear={acts.clear} onTouch={acts.touch}
        />
      ))}
      {checks.length > 0 && (
        <fieldset className="item field">
          <legend className="legend pt-2">{t('points.ticks')}</legend>
          {checks.map((item) => (
            <label key={item.item} className="tick-row">
              <input type="checkbox" checked={valueOf(item) === 1} disabled={isClosed} onChange={(event) => setPoint(item, event.target.checked ? 1 : 0)} />
              <span>{item.name} <span className="hint">{item.definition}</span></span>
            </label>
          ))}
        </fieldset>
      )}
      {points.map((item) => (
        <PointScale
          key={`${block}/${position}/${item.item}`} line={item} value={valueOf(item)} isClosed={isClosed} kept={state.answers.get(scoreKey(block, position, item.item))?.state ?? null}
          onSet={(value) => setPoint(item, value)} onClear={() => void store.record({ kind: 'clear', block, position, item: item.item })}
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
        <Trouble state={state} store={store} joinKey={sheet.joinKey} place={place} go={go} />
        {active && (activeValue !== null || before?.item === active.item) && !isClosed && (
          <FineSteps
            name={active.name} value={activeValue ?? 50} onStep={(value) => acts.set(active.item, value)} onClear={() => acts.clear(active.item)}
            onUndo={before?.item === active.item ? () => acts.undo(before) : null}
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
