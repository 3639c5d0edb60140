import Link from 'next/link';
import { CallsTable } from '@/components/calls/calls-table';
import { stylesOf } from '@/components/charts/styles';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import type { CallView } from '@/lib/calls/types';
import { count } from '@/lib/results/format';
import type { ResultsView } from '@/lib/results/types';
import { PanelTable } from './panel-table';
import { ProfileFound } from './profile-found';
import { Report } from './report';
import { Said } from './said';
import { SamplesTable } from './samples-table';
import { TriangleResult, TriangleSeats } from './triangle-result';
import { Verdict } from './verdict';

interface Props {
  results: ResultsView;
  /** `/c/…` */
  home: string;
  mayCall: boolean;
  maySeeBarrels: boolean;
  /** Calls that rest on this session; null when the reader may not see calls. */
  calls: CallView[] | null;
  cellar: string;
}

function FoundNote({ results }: { results: ResultsView }) {
  const { profile, triangle } = results;
  const panelists = results.seats.filter((seat) => seat.answers > 0).length;
  if (profile) {
    return (
      <>
        <span className="block">{count(panelists, 'panelist')}, {count(profile.replicates, 'replicate')}, line 0 to 100.</span>
        <span className="block pt-2">Same letter, or bars that overlap: no difference shown. Tukey, {Math.round(profile.alpha * 100)} %, over panelist × sample.</span>
        <span className="block pt-2">Could show: the smallest difference that this panel could have shown.</span>
      </>
    );
  }
  return <>{count(triangle!.n, 'answer')} by {count(panelists, 'panelist')}. Triangle test, exact binomial.</>;
}

/** The results of an unsealed session, by the cellar's questions. */
export function Results({ results, home, mayCall, maySeeBarrels, calls, cellar }: Props) {
  const { session, samples, profile, triangle } = results;
  const styles = stylesOf(samples);
  const callHref = `${home}/calls/new?session=${session.id}`;
  return (
    <LedgerPage>
      <LedgerHead margin="Question" title={session.question} actions={<span className="soft"><Link href={`${home}/sessions/${session.id}`}>{session.title}</Link>, unsealed {session.unsealedOn}</span>} />
      <LedgerRow question="Answer">
        <div className="apart" style={{ alignItems: 'flex-start' }}>
          <Verdict verdict={results.verdict} warnings={results.warnings} />
          {mayCall && <Link className="btn btn-main" href={callHref}>Record the call</Link>}
        </div>
      </LedgerRow>
      <LedgerRow question={profile ? 'What did the panel find?' : 'Is there a difference?'} note={<FoundNote results={results} />}>
        {profile ? <ProfileFound profile={profile} samples={samples} styles={styles} /> : <TriangleResult triangle={triangle!} />}
      </LedgerRow>
      <LedgerRow question={profile ? 'Barrels side by side' : 'What was compared?'} note={profile ? 'Named where a difference from at least one other was shown.' : undefined}>
        <SamplesTable samples={samples} profile={profile} styles={styles} barrels={maySeeBarrels ? home : null} callHref={mayCall ? (sample) => `${callHref}&sample=${sample.id}` : null} />
      </LedgerRow>
      <LedgerRow question="Can we believe this panel?">
        {profile ? <PanelTable panel={profile.panel} /> : <TriangleSeats triangle={triangle!} />}
      </LedgerRow>
      <LedgerRow question="What was said?"><Said said={results.said} samples={samples} styles={styles} /></LedgerRow>
      {calls && (
        <LedgerRow question="What was decided?">
          {calls.length > 0 ? <CallsTable cellar={cellar} calls={calls} /> : <p className="soft">No call rests on this session yet.</p>}
        </LedgerRow>
      )}
      <LedgerRow question="How was it run?" note={<a href={`/api/v1${home}/sessions/${session.id}/results`} download={`results-${session.id.slice(0, 8)}.json`}>All numbers as a file (JSON)</a>}><Report items={results.report} /></LedgerRow>
    </LedgerPage>
  );
}
