import type { ReactNode } from 'react';
import { WordsProvider } from '@/components/i18n/words';
import { Word } from '@/components/ui/mark';
import type { Wordlist } from '@/lib/i18n/words';
import { ViewMenu } from './view-menu';

/** A narrow page of a panelist or a cellar hand, in the device's language. */
export function PhonePage({ title, list, children }: { title: ReactNode; list: Wordlist; children: ReactNode }) {
  return (
    <WordsProvider list={list}>
      <div className="phone" lang={list.locale}>
        <header className="bar"><span style={{ fontSize: '1.125rem' }}><Word size={20} /></span><ViewMenu /></header>
        <main className="phone-body" id="main">
          <h1>{title}</h1>
          {children}
        </main>
      </div>
    </WordsProvider>
  );
}
