import type { SessionState } from '@/db/enums';
import { STATE_ORDER } from '@/lib/sessions/format';
import { Ring } from './ring';

/** draft, sealed, open, closed, unsealed: what is done, what is now, what is to come. */
export function StatePath({ state }: { state: SessionState }) {
  if (state === 'abandoned') return <p className="row warn"><Ring state="waits" /> abandoned</p>;
  const now = STATE_ORDER.indexOf(state);
  return (
    <ol className="states" aria-label="State of the session">
      {STATE_ORDER.map((step, index) => {
        const isNow = index === now && state !== 'unsealed';
        return (
          <li key={step} className={isNow ? 'live' : index > now ? 'hint' : ''} aria-current={index === now ? 'step' : undefined}>
            <Ring state={isNow ? 'open' : index <= now ? 'done' : 'to-come'} size={12} />{step}
          </li>
        );
      })}
    </ol>
  );
}
