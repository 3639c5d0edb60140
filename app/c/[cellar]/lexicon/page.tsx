import type { Metadata } from 'next';
import Link from 'next/link';
import { ArchiveDescriptorForm } from '@/components/lexicon/descriptor-form';
import { Empty } from '@/components/ui/empty';
import { LedgerHead, LedgerPage, LedgerRow } from '@/components/ui/ledger';
import { allows } from '@/lib/auth/permissions';
import { loadLexicon } from '@/lib/lexicon/loaders';

export const metadata: Metadata = { title: 'Lexicon' };

export default async function LexiconPage({ params, searchParams }: PageProps<'/c/[cellar]/lexicon'>) {
  const { cellar } = await params;
  const { q, archived } = await searchParams;
  const query = typeof q === 'string' ? q : '';
  const { access, families, count, total } = await loadLexicon(cellar, query, archived === 'yes');
  const base = `/c/${cellar}/lexicon`;
  const mayEdit = allows(access.roles, 'lexicon.edit');
  return (
    <LedgerPage>
      <LedgerHead margin="Lexicon" title="The words this cellar tastes with" actions={mayEdit && <Link className="btn btn-main" href={`${base}/new`}>Add a descriptor</Link>} />
      <LedgerRow question="Which word?" note={`${count} of ${total}`}>
        <form className="toolbar" role="search">
          <input className="input" type="search" name="q" defaultValue={query} placeholder="Word, family, sense" aria-label="Find a descriptor" />
          <label className="tick-row"><input type="checkbox" name="archived" value="yes" defaultChecked={archived === 'yes'} /> archived too</label>
          <button className="btn">Find</button>
        </form>
        {count === 0 && <Empty action={<Link href={base}>Show all</Link>}>No word fits “{query}”.</Empty>}
      </LedgerRow>
      {families.map(({ family, entries }) => (
        <LedgerRow key={family} question={family} note={`${entries.length}`}>
          <table className="ledger folds">
            <thead><tr><th scope="col">Word</th><th scope="col">Meant</th><th scope="col">Reference</th><th scope="col">At</th><th scope="col">Line</th>{mayEdit && <th scope="col">Change</th>}</tr></thead>
            <tbody>
              {entries.map((entry) => (
                <tr key={entry.id} className={entry.isArchived ? 'dim' : ''}>
                  <th scope="row">{mayEdit ? <Link href={`${base}/${entry.id}`}>{entry.name}</Link> : entry.name}</th>
                  <td data-label="Meant">{entry.definition}</td>
                  <td data-label="Reference" className="soft">{entry.reference}</td>
                  <td data-label="At" className="soft">{entry.phase}</td>
                  <td data-label="Line" className="soft">{entry.lowAnchor} to {entry.highAnchor}</td>
                  {mayEdit && <td><ArchiveDescriptorForm cellar={cellar} id={entry.id} isArchived={entry.isArchived} name={entry.name} /></td>}
                </tr>
              ))}
            </tbody>
          </table>
        </LedgerRow>
      ))}
    </LedgerPage>
  );
}
