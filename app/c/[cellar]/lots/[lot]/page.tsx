import type { Metadata } from 'next';
import Link from 'next/link';
import { ArchiveForm } from '@/components/register/fill-forms';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { allows } from '@/lib/auth/permissions';
import { orNotFound } from '@/lib/not-found';
import { DRINK_WORDS } from '@/lib/register/format';
import { loadLot } from '@/lib/register/loaders';

export const metadata: Metadata = { title: 'Lot' };

export default async function LotPage({ params }: PageProps<'/c/[cellar]/lots/[lot]'>) {
  const { cellar, lot: lotId } = await params;
  const { access, lot, stays } = await orNotFound(loadLot(cellar, lotId));
  const mayEdit = allows(access.roles, 'register.edit');
  return (
    <LedgerPage>
      <LedgerHead
        margin={lot.isArchived ? 'Archived' : 'Lot'} title={`${lot.code}, ${lot.name}`}
        actions={mayEdit && <><ArchiveForm cellar={cellar} kind="lot" id={lot.id} isArchived={lot.isArchived} /><Link className="btn" href={`/c/${cellar}/lots/${lot.id}/edit`}>Change</Link></>}
      />
      <LedgerRow question="What is it?">
        <dl className="facts">
          <dt>Drink</dt><dd>{DRINK_WORDS[lot.drink]}</dd>
          {lot.vintage && <><dt>Vintage</dt><dd>{lot.vintage}</dd></>}
          {lot.note && <><dt>Note</dt><dd>{lot.note}</dd></>}
        </dl>
      </LedgerRow>
      <LedgerRow question="Where does it lie?">
        {stays.length === 0 ? <Empty>In no vessel yet. Open a vessel and fill it with this lot.</Empty> : (
          <table className="ledger folds">
            <thead><tr><th scope="col">Vessel</th><th scope="col">From</th><th scope="col">To</th></tr></thead>
            <tbody>{stays.map((stay) => <tr key={stay.vesselId + stay.from}><td data-label="Vessel"><Link href={`/c/${cellar}/barrels/${stay.vesselId}`}>{stay.vessel}</Link></td><td data-label="From">{stay.from}</td><td data-label="To">{stay.to ?? <span className="live">still in</span>}</td></tr>)}</tbody>
          </table>
        )}
      </LedgerRow>
    </LedgerPage>
  );
}
