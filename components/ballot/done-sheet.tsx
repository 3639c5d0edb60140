'use client';

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
  go(place: Place): void;
}

/** After handing in: whether everything was received, and the seal to check later. */
export function DoneSheet({ sheet, store, state, go }: Props) {
  const isAllIn = state.waiting === 0;
  return (
    <>
      <div className="bench"><h1>{isAllIn ? 'Thank you. Everything was received.' : 'Handed in. Some of it still waits here.'}</h1></div>
      <Trouble state={state} store={store} joinKey={sheet.joinKey} />
      <div className="phone-body">
        <ul className="stack tight" role="status">
          <li className="row"><Ring state={isAllIn ? 'done' : 'open'} /> {isAllIn ? `${state.received} answers with a receipt` : `${state.waiting} on this phone: keep this page open until they are sent`}</li>
          {state.late > 0 && <li className="row warn"><Ring state="waits" /> {state.late} came after the close: kept and shown to the leader, not counted</li>}
        </ul>
        <p className="soft">Please say nothing of the glasses until the session is closed: others are still tasting.</p>
        <div className="stack tight">
          <h2>The seal</h2>
          <p className="soft">This number was fixed before anybody tasted. When the key is open you can check that nothing was changed.</p>
          <p className="hash"><Hash hex={sheet.commitment} /></p>
          <p><a href={`/check/${sheet.commitment}`}>Check it</a></p>
        </div>
        {sheet.method === 'profile' && state.sessionState === 'open' && <button type="button" className="btn" onClick={() => go(firstPlace(sheet))}>Change an answer</button>}
      </div>
    </>
  );
}
