import type { Metadata } from 'next';
import { NotYet } from '@/components/results/not-yet';
import { Results } from '@/components/results/results';
import { loadAccess } from '@/lib/auth/access';
import { allows } from '@/lib/auth/permissions';
import { listCallsOfSession } from '@/lib/calls/data';
import { loadResults } from '@/lib/results/loaders';

export const metadata: Metadata = { title: 'Results' };

export default async function ResultsPage({ params }: PageProps<'/c/[cellar]/sessions/[session]/results'>) {
  const { cellar, session } = await params;
  const access = await loadAccess(cellar, 'results.view');
  const home = `/c/${access.cellar.slug}`;
  const { results, notYet } = loadResults(access, session);
  if (!results) return <NotYet notYet={notYet} sessionHref={`${home}/sessions/${session}`} />;
  const maySeeBarrels = allows(access.roles, 'cellar.view');
  return (
    <Results
      results={results}
      home={home}
      cellar={access.cellar.slug}
      mayCall={allows(access.roles, 'call.make') && results.session.state === 'unsealed'}
      maySeeBarrels={maySeeBarrels}
      calls={maySeeBarrels ? listCallsOfSession(access, session) : null}
    />
  );
}
