import type { Grain, Toast } from '@/db/enums';
import { GRAIN_WORDS, TOAST_WORDS } from '@/lib/register/format';

interface Facts {
  volumeL: number;
  cooper: string;
  woodSpecies: string;
  woodOrigin: string;
  grain: Grain | null;
  toast: Toast | null;
  year: number | null;
  location: string;
  note: string;
}

/** What is known of a vessel; what isn't known is left out. */
export function VesselFacts({ vessel, present }: { vessel: Facts; present: { lot: string; lotName: string; from: string } | null }) {
  const wood = [vessel.woodSpecies && <i key="species">{vessel.woodSpecies}</i>, vessel.woodOrigin, vessel.grain && GRAIN_WORDS[vessel.grain], vessel.toast && TOAST_WORDS[vessel.toast]].filter(Boolean);
  return (
    <dl className="facts">
      <dt>Holds</dt><dd>{present ? <><b>{present.lot}</b>, {present.lotName}, since {present.from}</> : 'nothing'}</dd>
      <dt>Volume</dt><dd>{vessel.volumeL} L</dd>
      {vessel.cooper && <><dt>Cooper</dt><dd>{vessel.cooper}{vessel.year && `, ${vessel.year}`}</dd></>}
      {wood.length > 0 && <><dt>Wood</dt><dd>{wood.map((part, i) => <span key={i}>{i > 0 && ', '}{part}</span>)}</dd></>}
      {vessel.location && <><dt>Where</dt><dd>{vessel.location}</dd></>}
      {vessel.note && <><dt>Note</dt><dd>{vessel.note}</dd></>}
    </dl>
  );
}
