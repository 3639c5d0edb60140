import { readEarlyOpening } from '@/lib/sessions/early-opening';
import type { Access } from '@/lib/auth/access';
import type { OpeningView } from '@/lib/sessions/types';
import { EarlyDecisionForm } from './session-forms';

/** Requests to open before time: visible to all who run the session, what was opened only to the two. */
export function Openings({ access, openings, sessionId }: { access: Access; openings: OpeningView[]; sessionId: string }) {
  const which = { cellar: access.cellar.slug, sessionId };
  return (
    <ul className="stack">
      {openings.map((opening) => (
        <li key={opening.id} className="caution stack tight">
          <p><b>{opening.code ? `Code ${opening.code}` : 'The whole session'}</b>, asked for by {opening.requestedBy}, {opening.requestedAt}: {opening.reason}</p>
          {opening.state === 'waits' && (opening.isOwnRequest ? <p>A second person must approve.</p> : (
            <div className="row wrap"><EarlyDecisionForm {...which} openingId={opening.id} decision="approve" /><EarlyDecisionForm {...which} openingId={opening.id} decision="refuse" /></div>
          ))}
          {opening.state === 'approved' && <p>Approved by {opening.approvedBy}.{opening.mayRead && <> It is <b>{readEarlyOpening(access, opening.id)}</b>. Whoever reads this must not taste on.</>}</p>}
          {opening.state === 'refused' && <p>Refused.</p>}
        </li>
      ))}
    </ul>
  );
}
