'use client';

import { Rich, useWords } from '@/components/i18n/words';
import type { SheetState, SheetStore } from '@/lib/offline/store';
import type { Place } from '@/lib/offline/types';

/** How much is on this phone only, and what is on its way. Always visible. `isDrafting`: a finger has just moved. */
export function KeptLine({ state, isDrafting = false }: { state: SheetState; isDrafting?: boolean }) {
  const t = useWords();
  if (state.isUnkept || isDrafting) return <>{t('kept.saving')}</>;
  if (state.waiting > 0) return <>{t('kept.waiting', { n: state.waiting })}</>;
  if (state.sent > 0) return <>{t('kept.sending', { n: state.sent })}</>;
  return <>{state.received > 0 ? t('kept.allReceived') : t('kept.nothing')}</>;
}

interface Props {
  state: SheetState;
  store: SheetStore;
  joinKey: string;
  place: Place;
  go(place: Place): void;
}

/** Trouble in words, with the way on; nothing when all is well. */
export function Trouble({ state, store, joinKey, place, go }: Props) {
  const t = useWords();
  const owed = state.waiting + state.sent;
  const byCode = <button type="button" className="link" onClick={() => go({ ...place, view: 'handover' })}>{t('trouble.byCode')}</button>;
  if (state.isLost) return <p className="caution" role="alert"><Rich t={t} id="trouble.unkept" /> {byCode}</p>;
  if (state.refused.length > 0) {
    return (
      <div className="caution" role="status">
        <p><Rich t={t} id="trouble.refused" values={{ n: state.refused.length }} /></p>
        <ul>{[...new Set(state.refused.map((row) => row.message ?? ''))].map((message) => <li key={message}>{t.said(message)}</li>)}</ul>
      </div>
    );
  }
  if (state.trouble === 'no-seat') {
    return <p className="caution" role="status">{t('trouble.noSeat', { n: owed })} <a href={`/j/${joinKey}`}>{t('trouble.lookAgain')}</a></p>;
  }
  if (state.trouble && owed > 0) {
    return (
      <p className="caution row wrap" role="status">
        <span>{state.trouble === 'not-understood' ? t('trouble.notUnderstood') : state.isOld ? t('trouble.oldWaiting') : t('trouble.noSignal')}</span>
        <button type="button" className="link" onClick={() => void store.flush()}>{t('trouble.sendNow')}</button>
        {byCode}
      </p>
    );
  }
  return null;
}
