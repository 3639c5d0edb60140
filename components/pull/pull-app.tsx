'use client';

import { useEffect, useState } from 'react';
import { WordsProvider, useWords } from '@/components/i18n/words';
import { OfflineNotes } from '@/components/phone/offline-notes';
import { useAwake } from '@/components/phone/use-awake';
import { ViewMenu } from '@/components/phone/view-menu';
import type { Wordlist } from '@/lib/i18n/words';
import { randomUuid } from '@/lib/offline/uuid';
import type { PullBarrel, PullSheetView } from '@/lib/pulls/loaders';
import type { PhonePull } from '@/lib/pulls/schema';
import { ChooseBarrel } from './choose-barrel';
import { PullKept } from './pull-kept';
import { PullSteps } from './pull-steps';
import { PullTrouble } from './pull-trouble';
import { usePulls } from './use-pulls';

/** The cellar hand's sheet: barrel, steps in order, note, label, next barrel. Works without signal. */
export function PullApp({ view, list }: { view: PullSheetView; list: Wordlist }) {
  return (
    <WordsProvider list={list}>
      <PullScreen view={view} />
    </WordsProvider>
  );
}

function PullScreen({ view }: { view: PullSheetView }) {
  const t = useWords();
  const { store, state } = usePulls(view.cellar, view.userId);
  const [barrel, setBarrel] = useState<PullBarrel | null>(null);
  const [kept, setKept] = useState<{ barrel: PullBarrel; pull: PhonePull } | null>(null);
  useAwake(barrel !== null);
  useEffect(() => {
    // A barrel's tag opens this page with the barrel after the #.
    const fromTag = () => {
      const found = view.barrels.find((candidate) => candidate.vesselId === location.hash.slice(1));
      if (found) setBarrel(found);
    };
    fromTag();
    addEventListener('hashchange', fromTag);
    return () => removeEventListener('hashchange', fromTag);
  }, [view.barrels]);
  const finish = async (facts: Omit<PhonePull, 'opId' | 'vesselId' | 'pulledAt'>, of: PullBarrel) => {
    const pull: PhonePull = { ...facts, opId: randomUuid(), vesselId: of.vesselId, pulledAt: Date.now() };
    await store.record(pull, of.name, of.lot);
    void store.flush();
    setBarrel(null);
    setKept({ barrel: of, pull });
    history.replaceState(null, '', location.pathname);
    window.scrollTo(0, 0);
  };
  return (
    <div className="phone" lang={t.locale}>
      <header className="bar">
        <span><b>{t('pull.kicker')}</b> &nbsp;{view.cellarName}</span>
        <span className="row"><a className="hint" href={`/c/${view.cellar}`}>{t('pull.leave')}</a><ViewMenu /></span>
      </header>
      <main id="main" style={{ display: 'flex', flexDirection: 'column', flex: 1 }} aria-busy={!state.isReady}>
        <PullTrouble state={state} store={store} />
        {barrel && <PullSteps key={barrel.vesselId} barrel={barrel} onBack={() => setBarrel(null)} onKeep={(facts) => void finish(facts, barrel)} />}
        {!barrel && kept && <PullKept {...kept} state={state} onNext={() => setKept(null)} />}
        {!barrel && !kept && <ChooseBarrel barrels={view.barrels} state={state} onChoose={setBarrel} />}
        {!barrel && <OfflineNotes />}
      </main>
    </div>
  );
}
