import type { Metadata } from 'next';
import Link from 'next/link';
import { PrintButton } from '@/components/pour/print-button';
import { loadTags } from '@/lib/pulls/loaders';
import { VESSEL_WORDS } from '@/lib/register/format';

export const metadata: Metadata = { title: 'Barrel tags' };

export default async function TagsPage({ params }: PageProps<'/c/[cellar]/barrels/tags'>) {
  const { cellar } = await params;
  const { cellarName, tags } = await loadTags(cellar);
  return (
    <main className="sheet" id="main">
      <header>
        <div><h1>Barrel tags</h1><p>{cellarName}. A phone that scans a tag opens the pull sheet at that barrel. A tag stays true when the wine or the place changes.</p></div>
        <div className="right no-print row wrap"><Link className="btn" href={`/c/${cellar}/barrels`}>Back</Link><PrintButton /></div>
      </header>
      {tags.length === 0 && <p className="pt-4">No barrel holds wine, so there is nothing to tag yet.</p>}
      <div className="tags">
        {tags.map((tag) => (
          <div key={tag.vesselId} className="barrel-tag">
            {/* eslint-disable-next-line @next/next/no-img-element -- a data: picture */}
            <img src={tag.qr} alt={`QR code of ${tag.name}`} width={150} height={150} />
            <p><b>{tag.name}</b>{VESSEL_WORDS[tag.kind]}<br />{cellarName}</p>
          </div>
        ))}
      </div>
    </main>
  );
}
