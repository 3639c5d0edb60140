'use client';

import { useWords } from '@/components/i18n/words';
import { Code } from '@/components/ui/code';
import { gapsOf, openSets } from './flow';
import { Trouble } from './kept-line';
import { phaseWord } from './words';
import type { SheetPart } from './sheet-part';

/** Before handing in: what is still untouched, each with the way back to it. */
export function ReviewSheet({ sheet, store, state, place, go }: SheetPart) {
  const t = useWords();
  const gaps = sheet.ballot.kind === 'glasses' ? gapsOf(sheet, state.answers) : [];
  const open = openSets(sheet, state.answers);
  const isClosed = state.sessionState !== 'open';
  const missing = gaps.reduce((sum, gap) => sum + gap.missing, 0);
  const handIn = async () => {
    await store.record({ kind: 'submit' });
    go({ ...place, view: 'done' });
  };
  return (
    <>
      <div className="bench"><h1>{isClosed ? t('review.closed') : t('review.title')}</h1></div>
      <Trouble state={state} store={store} joinKey={sheet.joinKey} place={place} go={go} />
      <div className="phone-body">
        {missing > 0 && (
          <>
            <p>{t('review.untouched', { n: missing })}</p>
            <ul className="stack tight">
              {gaps.map((gap) => (
                <li key={`${gap.block}/${gap.position}/${gap.phase}`}>
                  <button type="button" className="btn wide" style={{ justifyContent: 'space-between' }} onClick={() => go({ view: 'glass', block: gap.block, position: gap.position, phase: gap.phase, restUntil: null })}>
                    <Code code={gap.code} size="s" label={t('common.codeWord')} />
                    <span>{t('review.gap', { part: phaseWord(t, gap.phase), n: gap.missing })}</span>
                  </button>
                </li>
              ))}
            </ul>
          </>
        )}
        {open.map((block) => (
          <button key={block} type="button" className="btn wide" onClick={() => go({ view: 'glass', block, position: 1, phase: null, restUntil: null })}>{t('review.openSet', { n: block })}</button>
        ))}
        {missing === 0 && open.length === 0 && <p>{t('review.complete')}</p>}
        {sheet.ballot.kind !== 'pick' && <p className="soft">{t('review.change')}</p>}
      </div>
      <footer className="foot-bar">
        <button type="button" className="btn btn-main wide" disabled={isClosed} onClick={() => void handIn()}>{t('review.handIn')}</button>
      </footer>
    </>
  );
}
