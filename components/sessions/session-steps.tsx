import Link from 'next/link';
import { Board } from '@/components/board/board';
import { JoinPanel } from '@/components/board/join-panel';
import { Hash } from '@/components/ui/hash';
import { LedgerRow } from '@/components/ui/ledger';
import { allows } from '@/lib/auth/permissions';
import type { Access } from '@/lib/auth/access';
import { readBoard } from '@/lib/board/loaders';
import { reach } from '@/lib/reach';
import type { SessionView } from '@/lib/sessions/types';
import { CloseForm, DuplicateForm, OpenForm, SealForm, UnsealForm } from './session-forms';

interface Props {
  access: Access;
  session: SessionView;
}

/** What can be done now, by the session's state. */
export function SessionSteps({ access, session }: Props) {
  const which = { cellar: access.cellar.slug, sessionId: session.id };
  const base = `/c/${which.cellar}/sessions/${session.id}`;
  const isHalf = session.coding === 'two_step' && session.unsealedAt === null;
  const mayRun = allows(access.roles, 'session.run');
  const mayDesign = allows(access.roles, 'session.design');
  return (
    <>
      {session.state === 'draft' && mayDesign && <DraftStep base={base} which={which} session={session} />}
      {session.isPourer && session.state !== 'draft' && session.state !== 'abandoned' && (
        <LedgerRow question={isHalf ? 'You prepare it' : 'You pour'} note={isHalf ? 'Reading it is logged. Show it to nobody; you may taste.' : 'Reading it is logged. Do not taste in this session.'}><Link className="btn btn-main" href={`${base}/pour`} prefetch={false}>{isHalf ? 'Your half of the coding' : 'Pour sheet'}</Link></LedgerRow>
      )}
      {session.state === 'sealed' && mayRun && (
        <LedgerRow question="Ready?" note="Opening lets people take their seats and answer."><OpenForm {...which} /></LedgerRow>
      )}
      {(session.state === 'open' || session.state === 'closed') && mayRun && (
        <LedgerRow question="Where is everyone?" note="Counts only: nobody sees a score before unsealing.">
          <Board url={`/api/v1/c/${which.cellar}/sessions/${session.id}/board`} method={session.method} initial={readBoard(access, session.id)} {...which} />
          <p className="pt-3">A phone without signal? <Link href={`${base}/handover`}>Scan its codes</Link></p>
        </LedgerRow>
      )}
      {session.joinUrl && session.joinQr && session.joinCode && (
        <LedgerRow question="How do they join?"><JoinPanel qr={session.joinQr} url={session.joinUrl} code={session.joinCode} mode={reach().mode} /></LedgerRow>
      )}
      {session.state === 'open' && mayRun && (
        <LedgerRow question="All in?" note="What comes later is set aside, shown, never counted."><div style={{ maxWidth: 420 }} className="stack"><p><b>Close ends all answers.</b> The board above tells which seats still owe theirs.</p><CloseForm {...which} /></div></LedgerRow>
      )}
      {session.state === 'closed' && mayRun && (
        <LedgerRow question="Open the key?" note="From here on everybody sees which glass was which.">
          <div style={{ maxWidth: 420 }} className="stack">
            <p>Closed {session.closedAt}.{session.closeReason && ` Some seats owed answers: ${session.closeReason}`}</p>
            {session.lateAnswers > 0 && <p className="warn">{session.lateAnswers} answers came after the close. They are kept, shown in the report, and not counted.</p>}
            <UnsealForm {...which} />
          </div>
        </LedgerRow>
      )}
      {session.state === 'unsealed' && <LedgerRow question="What came out?"><Link className="btn btn-main" href={`${base}/results`}>Results</Link></LedgerRow>}
      {session.state === 'unsealed' && mayRun && (
        <LedgerRow question="Who sat where?" note="A name goes when its person asks; the answers stay.">
          <Board url={`/api/v1/c/${which.cellar}/sessions/${session.id}/board`} method={session.method} initial={readBoard(access, session.id)} {...which} />
        </LedgerRow>
      )}
      {session.commitment && (
        <LedgerRow question="Was anything changed?" note="SHA-256 of the plan file, published at sealing.">
          <p className="soft">Sealed {session.sealedAt}</p>
          <p className="hash"><Hash hex={session.commitment} /></p>
          <Link href={`/check/${session.commitment}`}>Check it</Link>
        </LedgerRow>
      )}
      {session.state !== 'draft' && mayDesign && <LedgerRow question="Again?"><DuplicateForm {...which} /></LedgerRow>}
    </>
  );
}

function DraftStep({ base, which, session }: { base: string; which: { cellar: string; sessionId: string }; session: SessionView }) {
  const isReady = session.missing.length === 0;
  return (
    <LedgerRow question="What is missing?" note="Sealing fixes the plan, draws the codes and locks the key away.">
      <div className="stack" style={{ maxWidth: 640 }}>
        {isReady ? <p>Nothing. The plan can be sealed.</p> : <ul className="stack tight">{session.missing.map((text) => <li key={text} className="warn">{text}</li>)}</ul>}
        {session.warnings.length > 0 && <ul className="stack tight">{session.warnings.map((text) => <li key={text} className="soft">{text}</li>)}</ul>}
        <div className="row wrap"><Link className={isReady ? 'btn' : 'btn btn-main'} href={`${base}/design`}>Change the design</Link></div>
        {isReady && <SealForm {...which} />}
      </div>
    </LedgerRow>
  );
}
