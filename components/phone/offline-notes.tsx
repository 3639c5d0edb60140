'use client';

import { useSyncExternalStore } from 'react';
import { useWords } from '@/components/i18n/words';

const never = () => () => {};

/** iOS deletes what a page keeps after seven days without a visit, unless it stands on the home screen. */
const isIosInBrowser = (): boolean =>
  /iP(hone|ad|od)/.test(navigator.userAgent) && !('standalone' in navigator && (navigator as { standalone?: boolean }).standalone === true);

const noteFor = (): 'plainHttp' | 'install' | null => (!window.isSecureContext ? 'plainHttp' : isIosInBrowser() ? 'install' : null);

/** What this device can’t do offline, and what helps: said plainly, once. */
export function OfflineNotes() {
  const t = useWords();
  const note = useSyncExternalStore(never, noteFor, () => null);
  return note && <p className="hint" style={{ padding: 'var(--s-3) var(--s-4)' }}>{t(`sheet.${note}`)}</p>;
}
