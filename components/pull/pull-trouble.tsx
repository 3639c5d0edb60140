'use client';

import { useWords } from '@/components/i18n/words';
import type { PullState, PullStore } from '@/lib/offline/pull-store';

/** What waits and what could not be kept, with the way on. */
export function PullTrouble({ state, store }: { state: PullState; store: PullStore }) {
  const t = useWords();
  const refused = state.rows.filter((row) => row.state === 'refused');
  if (state.isLost) return <p className="caution" role="alert">{t('pull.lost')}</p>;
  return (
    <>
      {refused.map((row) => <p key={row.opId} className="caution" role="status"><b>{row.barrel}.</b> {t('pull.refused', { message: t.said(row.message ?? '') })}</p>)}
      {state.waiting > 0 && state.trouble && (
        <p className="caution row wrap" role="status">
          <span>{t('pull.unsent', { n: state.waiting })}. {state.trouble === 'signed-out' ? t('pull.signIn') : t('pull.offlineNote')}</span>
          {state.trouble === 'signed-out' ? <a href="/sign-in">{t('pull.signInLink')}</a> : <button type="button" className="link" onClick={() => void store.flush()}>{t('trouble.sendNow')}</button>}
        </p>
      )}
    </>
  );
}
