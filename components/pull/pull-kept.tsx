'use client';

import { useWords } from '@/components/i18n/words';
import { Ring } from '@/components/ui/ring';
import type { PullState } from '@/lib/offline/pull-store';
import type { PullBarrel } from '@/lib/pulls/loaders';
import type { PhonePull } from '@/lib/pulls/schema';

/** After a pull: what goes on the bottle, whether it was received, the next barrel. */
export function PullKept({ barrel, pull, state, onNext }: { barrel: PullBarrel; pull: PhonePull; state: PullState; onNext(): void }) {
  const t = useWords();
  const isReceived = state.rows.find((candidate) => candidate.opId === pull.opId)?.state === 'received';
  const when = new Intl.DateTimeFormat(t.locale, { dateStyle: 'medium', timeStyle: 'short' }).format(pull.pulledAt);
  return (
    <>
      <div className="phone-body">
        <h1>{t('pull.label')}</h1>
        <div className="label pull-label">
          <p className="told pull-name">{barrel.name}</p>
          <div className="fields"><span>{barrel.lot}</span><span>{when}</span><span>{pull.volumeMl} mL</span></div>
        </div>
        <p className="soft no-print">{t('pull.labelWords')}</p>
        {(!state.isLost || isReceived) && <p className="row no-print" role="status"><Ring state={isReceived ? 'done' : 'open'} /> {isReceived ? t('kept.received') : t('kept.onPhone')}</p>}
        <p className="no-print"><button type="button" className="btn" onClick={() => window.print()}>{t('pull.printLabel')}</button></p>
      </div>
      <footer className="foot-bar no-print"><button type="button" className="btn btn-main wide" onClick={onNext}>{t('pull.nextBarrel')}</button></footer>
    </>
  );
}
