import type { Metadata } from 'next';
import Link from 'next/link';
import { Chooser } from '@/components/planner/chooser';
import { PanelPlanner } from '@/components/planner/panel-planner';
import { ProfilePlanner } from '@/components/planner/profile-planner';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { panelHint } from '@/lib/planner/format';
import { loadPlanner } from '@/lib/planner/loaders';
import { splitQuery } from '@/lib/planner/queries';

export const metadata: Metadata = { title: 'Plan a test' };

export default async function PlanPage({ params, searchParams }: PageProps<'/c/[cellar]/plan'>) {
  const { cellar } = await params;
  const { access, facts } = await loadPlanner(cellar);
  const query = await searchParams;
  const home = `/c/${access.cellar.slug}`;
  const choosing = splitQuery(query, 'choose');
  const panel = splitQuery(query, 'panel');
  const profile = splitQuery(query, 'profile');
  // Nothing asked yet: begin with the people that the cellar has.
  const questions = Object.keys(choosing.own).length > 0 ? choosing.own : { people: String(facts.panel) };
  // A link of the page brings another question: its form begins anew.
  const keyOf = (own: object) => JSON.stringify(own);
  return (
    <LedgerPage>
      <LedgerHead margin="Sessions" title="Plan a test" actions={<><a className="btn btn-bare" href="#panel-of-a-test">Panel of a test</a><a className="btn btn-bare" href="#panel-of-a-profile">Panel of a profile</a><Link className="btn" href={`${home}/sessions/new`}>Straight to the design</Link></>} />
      <LedgerRow question="Which method?" note="Answer in plain words. The choice stays yours.">
        <Chooser key={keyOf(choosing)} home={home} query={questions} kept={choosing.others} />
      </LedgerRow>
      <LedgerRow id="panel-of-a-test" question="How many people for a test?" note="Choose all risks before anybody tastes.">
        <PanelPlanner key={keyOf(panel)} query={panel.own} kept={panel.others} panel={facts.panel} panelHint={panelHint(facts)} />
      </LedgerRow>
      <LedgerRow id="panel-of-a-profile" question="What can a profile tell apart?" note="From what the panel’s own repeats showed.">
        <ProfilePlanner key={keyOf(profile)} query={profile.own} kept={profile.others} panel={facts.panel} past={facts.past} />
      </LedgerRow>
    </LedgerPage>
  );
}
