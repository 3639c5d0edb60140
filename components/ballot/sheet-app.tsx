'use client';

import dynamic from 'next/dynamic';
import { useEffect, useRef } from 'react';
import { WordsProvider, useWords } from '@/components/i18n/words';
import { OfflineNotes } from '@/components/phone/offline-notes';
import { useAwake } from '@/components/phone/use-awake';
import { ViewMenu } from '@/components/phone/view-menu';
import type { Sheet } from '@/lib/ballots/types';
import type { Wordlist } from '@/lib/i18n/words';
import type { Place } from '@/lib/offline/types';
import { DoneSheet } from './done-sheet';
import { codeAt, firstPlace, isByGlass } from './flow';
import { ProfileSheet } from './profile-sheet';
import { RestScreen } from './rest-screen';
import { ReviewSheet } from './review-sheet';
import { useSheet } from './use-sheet';

const loadHandover = () => import('@/components/handover/handover-sheet').then((module) => module.HandoverSheet);
const HandoverSheet = dynamic(loadHandover, { ssr: false });
// Drawn on the server, so that a sheet carries the scripts of its own kind of answer only.
const PickSheet = dynamic(() => import('./pick-sheet').then((module) => module.PickSheet));
const OrderSheet = dynamic(() => import('./order-sheet').then((module) => module.OrderSheet));
const NoteSheet = dynamic(() => import('./note-sheet').then((module) => module.NoteSheet));

/** The panelist's sheet in the panelist's language: a reload comes back to the same glass and part. */
export function SheetApp({ sheet, list }: { sheet: Sheet; list: Wordlist }) {
  return (
    <WordsProvider list={list}>
      <SheetScreen sheet={sheet} />
    </WordsProvider>
  );
}

function SheetScreen({ sheet }: { sheet: Sheet }) {
  const t = useWords();
  const { store, state } = useSheet(sheet);
  const place = state.place ?? (sheet.isSubmitted ? { ...firstPlace(sheet), view: 'done' as const } : firstPlace(sheet));
  const top = useRef<HTMLElement>(null);
  const where = `${place.view}/${place.block}/${place.position}/${place.phase}`;
  useAwake(place.view === 'glass' || place.view === 'rest' || place.view === 'handover');
  useEffect(() => {
    window.scrollTo(0, 0);
  }, [where]);
  useEffect(() => {
    // Without signal nothing can be fetched any more: the way out is on the phone beforehand.
    const idle = setTimeout(() => void loadHandover(), 4_000);
    return () => clearTimeout(idle);
  }, []);
  const go = (next: Place) => {
    void store.moveTo(next).then(() => store.flush());
    top.current?.focus({ preventScroll: true });
  };
  const parts = { sheet, store, state, go, place };
  const byGlass = isByGlass(sheet);
  const { kind } = sheet.ballot;
  return (
    <div className="phone" lang={t.locale}>
      <header className="bar">
        <span><b>{t('sheet.seat', { label: sheet.seatLabel })}</b> &nbsp;{sheet.title}</span>
        <span className="row"><a className="hint" href={`/t/${sheet.joinKey}/leave`}>{t('sheet.leave')}</a><ViewMenu /></span>
      </header>
      <main id="main" ref={top} tabIndex={-1} style={{ display: 'flex', flexDirection: 'column', flex: 1, outline: 'none' }} aria-busy={!state.isReady}>
        {state.sessionState !== 'open' && place.view !== 'done' && place.view !== 'handover' && <p className="caution" role="status">{t('sheet.closedNote')}</p>}
        {place.view === 'rest' && (
          <RestScreen
            until={place.restUntil ?? 0} restS={sheet.restS} onNext={() => go({ ...place, view: 'glass', restUntil: null })}
            next={{ kind: byGlass ? 'Glass' : 'Set', n: byGlass ? place.position : place.block, code: codeAt(sheet, place.block, place.position) }}
          />
        )}
        {place.view === 'glass' && kind === 'glasses' && <ProfileSheet {...parts} key={`${place.block}/${place.position}/${place.phase}`} />}
        {place.view === 'glass' && kind === 'note' && <NoteSheet {...parts} key={`${place.block}/${place.position}`} />}
        {place.view === 'glass' && kind === 'pick' && <PickSheet {...parts} key={place.block} />}
        {place.view === 'glass' && kind === 'order' && <OrderSheet {...parts} key={place.block} />}
        {place.view === 'review' && <ReviewSheet {...parts} />}
        {place.view === 'done' && <DoneSheet {...parts} />}
        {place.view === 'handover' && <HandoverSheet sheet={sheet} store={store} state={state} onBack={() => go({ ...place, view: state.answers.has('submit') ? 'done' : 'glass' })} />}
        {(place.view === 'done' || place.view === 'review') && <OfflineNotes />}
      </main>
    </div>
  );
}
