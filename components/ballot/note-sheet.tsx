'use client';

import { useEffect, useMemo, useRef, useState } from 'react';
import { useWords } from '@/components/i18n/words';
import type { Locale } from '@/lib/i18n/locales';
import { COMMENT_MAX } from '@/lib/ballots/limits';
import type { SheetItem } from '@/lib/ballots/types';
import { findTerms } from '@/lib/lexicon/find-terms';
import { commentKey, scoreKey } from '@/lib/offline/answers';
import { afterRest, codeAt, nextGlass, sealShort } from './flow';
import { GlassLabel } from './glass-label';
import { KeptLine, Trouble } from './kept-line';
import { PointScale } from './point-scale';
import type { SheetPart } from './sheet-part';
import { keptWord } from './words';

/** How long after the last key what was written is kept; leaving the field keeps it at once. */
const PAUSE_MS = 700;

/** One glass in the panelist's own words; the lexicon's descriptors found in them are offered to be confirmed and rated. */
export function NoteSheet({ sheet, store, state, place, go }: SheetPart) {
  const t = useWords();
  const { block, position } = place;
  const isClosed = state.sessionState !== 'open';
  const op = state.answers.get(commentKey(block, position))?.op;
  const keptText = op?.kind === 'comment' ? op.text : '';
  const [typed, setTyped] = useState<string | null>(null);
  const text = typed ?? keptText;
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const keep = (value: string) => {
    clearTimeout(timer.current);
    if (value !== keptText) void store.record({ kind: 'comment', block, position, text: value });
  };
  useEffect(() => () => clearTimeout(timer.current), []);
  const onType = (value: string) => {
    setTyped(value);
    clearTimeout(timer.current);
    timer.current = setTimeout(() => keep(value), PAUSE_MS);
  };
  const terms = useMemo(() => sheet.items.filter((item): item is SheetItem & { kind: 'term' } => item.kind === 'term'), [sheet.items]);
  const found = useMemo(() => new Map(findTerms(text, terms, t.locale as Locale).map((term) => [term.item, term])), [text, terms, t.locale]);
  const valueOf = (item: SheetItem): number | null => {
    const score = state.answers.get(scoreKey(block, position, item.item))?.op;
    return score?.kind === 'score' ? score.value : null;
  };
  // What was once confirmed stays in view when the text changes.
  const offered = terms.filter((item) => (found.has(item.item) && !found.get(item.item)!.isNegated) || (valueOf(item) ?? 0) > 0);
  const denied = terms.filter((item) => found.get(item.item)?.isNegated);
  const glasses = sheet.blocks.find((candidate) => candidate.block === block)!.glasses;
  const next = nextGlass(sheet, place);
  const leave = (to: typeof place) => {
    keep(text);
    go(to);
  };

  return (
    <>
      <GlassLabel
        fields={[sheet.blocks.length > 1 ? t('sheet.flightOf', { n: block, total: sheet.blocks.length }) : t('sheet.flight'), t('sheet.glassOf', { n: position, total: glasses.length }), t('sheet.seal', { hash: sealShort(sheet) })]}
        code={codeAt(sheet, block, position)} done={position - 1} total={glasses.length} foot={<KeptLine state={state} isDrafting={typed !== null && typed !== keptText} />}
      />
      <div className="item field">
        <label htmlFor="note"><span className="name">{t('note.ask')}</span> <span className="hint">{typed === keptText && op ? keptWord(t, state.answers.get(commentKey(block, position))!.state) : ''}</span></label>
        <p className="hint" id="note-how">{t('note.how')}</p>
        <textarea id="note" className="input" rows={5} maxLength={COMMENT_MAX} aria-describedby="note-how" value={text} disabled={isClosed} onChange={(event) => onType(event.target.value)} onBlur={() => keep(text)} />
      </div>
      <div className="phase"><h2>{t('note.found')}</h2><span className="soft" role="status">{t('note.count', { n: offered.length })}</span></div>
      {offered.map((item) => (
        <PointScale
          key={item.item} line={item} value={valueOf(item)} isClosed={isClosed} kept={state.answers.get(scoreKey(block, position, item.item))?.state ?? null}
          onSet={(value) => void store.record({ kind: 'score', block, position, item: item.item, value })} onClear={() => void store.record({ kind: 'clear', block, position, item: item.item })}
        />
      ))}
      {denied.length > 0 && <p className="rest soft">{t('note.denied', { words: denied.map((item) => item.name.toLowerCase()).join(', ') })}</p>}
      <footer className="foot-bar">
        <Trouble state={state} store={store} joinKey={sheet.joinKey} place={place} go={go} />
        <div className="acts">
          {position > 1 && <button type="button" className="btn" onClick={() => leave({ ...place, position: position - 1 })}>{t('sheet.glass', { n: position - 1 })}</button>}
          <button type="button" className="btn btn-main" onClick={() => leave(next ? afterRest(sheet, { ...next, phase: null }) : { ...place, view: 'review' })}>{t(next ? 'sheet.glassDone' : 'sheet.lookOver')}</button>
        </div>
      </footer>
    </>
  );
}
