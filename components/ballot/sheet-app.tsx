'use client';

import { useEffect, useRef } from 'react';
import { ModeSwitch } from '@/components/ui/mode-switch';
import type { Sheet } from '@/lib/ballots/types';
import type { Place } from '@/lib/offline/types';
import { DoneSheet } from './done-sheet';
import { codeAt, firstPlace } from './flow';
import { ProfileSheet } from './profile-sheet';
import { RestScreen } from './rest-screen';
import { ReviewSheet } from './review-sheet';
import { TriangleSheet } from './triangle-sheet';
import { useSheet } from './use-sheet';

/** The panelist's sheet: a reload comes back to the same glass and part. */
export function SheetApp({ sheet }: { sheet: Sheet }) {
  const { store, state } = useSheet(sheet);
  const place = state.place ?? (sheet.isSubmitted ? { ...firstPlace(sheet), view: 'done' as const } : firstPlace(sheet));
  const top = useRef<HTMLElement>(null);
  const where = `${place.view}/${place.block}/${place.position}/${place.phase}`;
  useEffect(() => {
    window.scrollTo(0, 0);
  }, [where]);
  const go = (next: Place) => {
    void store.moveTo(next).then(() => store.flush());
    top.current?.focus({ preventScroll: true });
  };
  const parts = { sheet, store, state, go };
  const isProfile = sheet.method === 'profile';
  return (
    <div className="phone">
      <header className="bar">
        <span><b>Seat {sheet.seatLabel}</b> &nbsp;{sheet.title}</span>
        <span className="row"><a className="hint" href={`/t/${sheet.joinKey}/leave`}>Leave</a><ModeSwitch /></span>
      </header>
      <main id="main" ref={top} tabIndex={-1} style={{ display: 'flex', flexDirection: 'column', flex: 1, outline: 'none' }} aria-busy={!state.isReady}>
        {state.sessionState !== 'open' && place.view !== 'done' && <p className="caution" role="status">The session is closed. What is sent from now on is kept and shown to the leader, but not counted.</p>}
        {place.view === 'rest' && (
          <RestScreen
            until={place.restUntil ?? 0} restS={sheet.restS} nextCode={codeAt(sheet, place.block, place.position)}
            nextWord={isProfile ? `glass ${place.position}` : `set ${place.block}`} onNext={() => go({ ...place, view: 'glass', restUntil: null })}
          />
        )}
        {place.view === 'glass' && (isProfile ? <ProfileSheet {...parts} place={place} key={`${place.block}/${place.position}/${place.phase}`} /> : <TriangleSheet {...parts} place={place} key={place.block} />)}
        {place.view === 'review' && <ReviewSheet {...parts} place={place} />}
        {place.view === 'done' && <DoneSheet {...parts} />}
      </main>
    </div>
  );
}
