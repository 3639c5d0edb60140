import type { Metadata } from 'next';
import Link from 'next/link';
import { CallForm } from '@/components/calls/call-form';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { loadAccess } from '@/lib/auth/access';
import { loadCallDraft } from '@/lib/calls/loaders';

export const metadata: Metadata = { title: 'Record a call' };

const one = (value: string | string[] | undefined) => (typeof value === 'string' ? value : undefined);

export default async function NewCallPage({ params, searchParams }: PageProps<'/c/[cellar]/calls/new'>) {
  const { cellar } = await params;
  const query = await searchParams;
  const access = await loadAccess(cellar, 'call.make');
  const draft = loadCallDraft(access, { session: one(query.session), sample: one(query.sample), vessel: one(query.vessel) });
  const home = `/c/${access.cellar.slug}`;
  return (
    <LedgerPage>
      <LedgerHead margin="Call" title="Record the call" actions={<Link className="btn btn-bare" href={`${home}/calls`}>Cancel</Link>} />
      {draft.session && (
        <LedgerRow question="On which evidence?">
          <p><Link href={`${home}/sessions/${draft.session.id}/results`}>{draft.session.title}</Link> <span className="soft">is kept with the call.</span></p>
        </LedgerRow>
      )}
      <LedgerRow question="What is decided?" note={`Decided by ${access.user.name}, today.`}>
        {draft.options.length === 0 ? (
          <Empty action={<Link className="btn" href={`${home}/barrels`}>To the barrels</Link>}>No barrel holds anything yet. A call is made on what a barrel holds.</Empty>
        ) : (
          <div style={{ maxWidth: 560 }}><CallForm cellar={access.cellar.slug} draft={draft} /></div>
        )}
      </LedgerRow>
    </LedgerPage>
  );
}
