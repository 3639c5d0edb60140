'use client';

import { createContext, useContext, useMemo, type ReactNode } from 'react';
import { wordsOf, type MessageKey, type Wordlist, type Words } from '@/lib/i18n/words';

/** Without a provider (the desk) texts of the server are said as they come. */
const DESK: Words = wordsOf({ locale: 'en', messages: {}, said: {} });

const Context = createContext<Words>(DESK);

/** Gives a phone page its language. */
export function WordsProvider({ list, children }: { list: Wordlist; children: ReactNode }) {
  const words = useMemo(() => wordsOf(list), [list]);
  return <Context value={words}>{children}</Context>;
}

export const useWords = (): Words => useContext(Context);

/** A message with `<b>` in it. */
export function Rich({ t, id, values = {} }: { t: Words; id: MessageKey; values?: Record<string, string | number> }) {
  return <>{t.rich<ReactNode>(id, values, (chunks) => <b key={id}>{chunks}</b>)}</>;
}
