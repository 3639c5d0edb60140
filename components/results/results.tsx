import type { ReactNode } from 'react';
import Link from 'next/link';
import { CallsTable } from '@/components/calls/calls-table';
import { stylesOf } from '@/components/charts/styles';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import type { CallView } from '@/lib/calls/types';
import { factsOf } from '@/lib/methods/facts';
import { count } from '@/lib/results/format';
import type { ResultsView } from '@/lib/results/types';
import { ChoiceResult } from './choice-result';
import { ChoiceSeats } from './choice-seats';
import { OrderResult, OrderSeats } from './order-result';
import { PairResult, PairSeats } from './pair-result';
import { PanelTable } from './panel-table';
import { ProfileFound } from './profile-found';
import { Report } from './report';
import { RightResult } from './right-result';
import { Said } from './said';
import { SamplesTable } from './samples-table';
import { TakeAway } from './take-away';
import { TicksResult } from './ticks-result';
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
  const { profile, choice, pair } = results;
  const panelists = count(results.seats.filter((seat) => seat.answers > 0).length, 'panelist');
  if (profile) {
    return (
      <>
        <span className="block">{panelists}, {count(profile.replicates, 'replicate')}, scale {profile.scale.low} to {profile.scale.high}.</span>
        <span className="block pt-2">Same letter, or bars that overlap: no difference shown. Tukey, {Math.round(profile.alpha * 100)} %, over panelist × sample.</span>
        <span className="block pt-2">Could show: the smallest difference that this panel could have shown.</span>
      </>
    );
  }
  const { name } = factsOf(results.session.method);
  const answers = choice ?? pair;
  return <>{name}. {answers ? `${count(answers.n, 'answer')} by ${panelists}` : panelists}.</>;
}

interface Section {
  asks: string;
  found: ReactNode;
  /** Whether the panel, or each seat's answers, can be shown. */
  panel: ReactNode;
}

function sectionOf(results: ResultsView, styles: ReturnType<typeof stylesOf>): Section {
  const { samples, profile, choice, pair, order, ticks, right } = results;
  if (profile) return { asks: 'What did the panel find?', found: <ProfileFound profile={profile} samples={samples} styles={styles} />, panel: <PanelTable panel={profile.panel} /> };
  if (choice) return { asks: 'Is there a difference?', found: <ChoiceResult choice={choice} />, panel: <ChoiceSeats sets={choice.sets} bySeat={choice.bySeat} /> };
  if (pair) return { asks: pair.asks === 'liked' ? 'Which is liked better?' : 'Which has more?', found: <PairResult pair={pair} samples={samples} />, panel: <PairSeats pair={pair} samples={samples} /> };
  if (order) return { asks: 'In which order?', found: <OrderResult order={order} samples={samples} styles={styles} />, panel: <OrderSeats order={order} samples={samples} /> };
  if (ticks) return { asks: ticks.kind === 'check' ? 'Which words fit?' : 'What was found in the notes?', found: <TicksResult ticks={ticks} samples={samples} />, panel: null };
  return { asks: 'How much is right?', found: <RightResult right={right!} samples={samples} />, panel: null };
}

/** The results of an unsealed session, by the cellar's questions. */
export function Results({ results, home, mayCall, maySeeBarrels, calls, cellar }: Props) {
  const { session, samples, profile } = results;
  const styles = stylesOf(samples);
  const section = sectionOf(results, styles);
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
      <LedgerRow question={section.asks} note={<FoundNote results={results} />}>
        {section.found}
      </LedgerRow>
      <LedgerRow question={profile ? 'Barrels side by side' : 'What was compared?'} note={profile ? 'Named where a difference from at least one other was shown.' : undefined}>
        <SamplesTable samples={samples} profile={profile} styles={styles} barrels={maySeeBarrels ? home : null} callHref={mayCall ? (sample) => `${callHref}&sample=${sample.id}` : null} />
      </LedgerRow>
      {section.panel && <LedgerRow question="Can we believe this panel?">{section.panel}</LedgerRow>}
      <LedgerRow question="What was said?"><Said said={results.said} samples={samples} styles={styles} /></LedgerRow>
      {calls && (
        <LedgerRow question="What was decided?">
          {calls.length > 0 ? <CallsTable cellar={cellar} calls={calls} /> : <p className="soft">No call rests on this session yet.</p>}
        </LedgerRow>
      )}
      <LedgerRow question="How was it run?" note={<a href={`/api/v1${home}/sessions/${session.id}/results`} download={`results-${session.id.slice(0, 8)}.json`}>All numbers as a file (JSON)</a>}><Report items={results.report} /></LedgerRow>
      <LedgerRow question="Take it with you"><TakeAway href={`/api/v1${home}/sessions/${session.id}/results`} /></LedgerRow>
    </LedgerPage>
  );
}
