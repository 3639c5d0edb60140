'use client';

import { Code } from '@/components/ui/code';
import { choiceKey } from '@/lib/offline/answers';
import { gapsOf } from './flow';
import { Trouble } from './kept-line';
import { PHASE_WORDS } from './words';
import type { SheetPart } from './sheet-part';

/** Before handing in: what is still untouched, each with the way back to it. */
export function ReviewSheet({ sheet, store, state, place, go }: SheetPart) {
  const gaps = sheet.method === 'profile' ? gapsOf(sheet, state.answers) : [];
  const openSets = sheet.method === 'triangle' ? sheet.blocks.filter(({ block }) => !state.answers.has(choiceKey(block))) : [];
  const isClosed = state.sessionState !== 'open';
  const missing = gaps.reduce((sum, gap) => sum + gap.missing, 0);
  const handIn = async () => {
    await store.record({ kind: 'submit' });
    go({ ...place, view: 'done' });
  };
  return (
    <>
      <div className="bench"><h1>{isClosed ? 'The session is closed' : 'Hand in your sheet'}</h1></div>
      <Trouble state={state} store={store} joinKey={sheet.joinKey} />
      <div className="phone-body">
        {missing > 0 && (
          <>
            <p>{missing === 1 ? 'One line is' : `${missing} lines are`} still untouched. Leave them so, or go back:</p>
            <ul className="stack tight">
              {gaps.map((gap) => (
                <li key={`${gap.block}/${gap.position}/${gap.phase}`}>
                  <button type="button" className="btn wide" style={{ justifyContent: 'space-between' }} onClick={() => go({ view: 'glass', block: gap.block, position: gap.position, phase: gap.phase, restUntil: null })}>
                    <Code code={gap.code} size="s" />
                    <span>{PHASE_WORDS[gap.phase]}, {gap.missing} {gap.missing === 1 ? 'line' : 'lines'}</span>
                  </button>
                </li>
              ))}
            </ul>
          </>
        )}
        {openSets.map(({ block }) => (
          <button key={block} type="button" className="btn wide" onClick={() => go({ view: 'glass', block, position: 1, phase: null, restUntil: null })}>Set {block} is not locked: go back to it</button>
        ))}
        {missing === 0 && openSets.length === 0 && <p>Every glass is answered.</p>}
        {sheet.method === 'profile' && <p className="soft">Until the session closes you can still change what you scored, also after handing in.</p>}
      </div>
      <footer className="foot-bar">
        <button type="button" className="btn btn-main wide" disabled={isClosed} onClick={() => void handIn()}>Hand in</button>
      </footer>
    </>
  );
}
