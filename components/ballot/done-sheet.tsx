'use client';

import { useWords } from '@/components/i18n/words';
import { Hash } from '@/components/ui/hash';
import { Ring } from '@/components/ui/ring';
import type { Sheet } from '@/lib/ballots/types';
import type { SheetState, SheetStore } from '@/lib/offline/store';
import type { Place } from '@/lib/offline/types';
import { firstPlace } from './flow';
import { Trouble } from './kept-line';

interface Props {
  sheet: Sheet;
  store: SheetStore;
  state: SheetState;
  place: Place;
  go(place: Place): void;
}

/** After handing in: whether everything was received, and the seal to check later. */
export function DoneSheet({ sheet, store, state, place, go }: Props) {
  const t = useWords();
  const owed = state.waiting + state.sent;
  const isAllIn = owed === 0;
  return (
    <>
      <div className="bench"><h1>{isAllIn ? t('done.thanks') : t('done.waits')}</h1></div>
      <Trouble state={state} store={store} joinKey={sheet.joinKey} place={place} go={go} />
      <div className="phone-body">
        <ul className="stack tight" role="status">
          <li className="row"><Ring state={isAllIn ? 'done' : 'open'} /> {isAllIn ? t('done.receipts', { n: state.received, receipt: state.lastReceipt }) : t('done.onPhone', { n: owed })}</li>
          {state.late > 0 && <li className="row warn"><Ring state="waits" /> {t('done.late', { n: state.late })}</li>}
        </ul>
        <p className="soft">{t('done.quiet')}</p>
        <div className="stack tight">
          <h2>{t('done.seal')}</h2>
          <p className="soft">{t('done.sealWords')}</p>
          <p className="hash"><Hash hex={sheet.commitment} /></p>
          <p><a href={`/check/${sheet.commitment}`}>{t('done.check')}</a></p>
        </div>
        {sheet.ballot.kind !== 'pick' && state.sessionState === 'open' && <button type="button" className="btn" onClick={() => go(firstPlace(sheet))}>{t('done.change')}</button>}
      </div>
    </>
  );
}
