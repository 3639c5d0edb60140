import Link from 'next/link';
import { Marker } from '@/components/charts/marker';
import type { SampleStyle } from '@/components/charts/styles';
import { VESSEL_WORDS } from '@/lib/register/format';
import { listWords, showPercent, woodWords } from '@/lib/results/format';
import type { ComponentView, ProfileView, SampleView } from '@/lib/results/types';

interface Props {
  samples: SampleView[];
  profile: ProfileView | null;
  styles: Map<number, SampleStyle>;
  /** `/c/…` for links to barrels, or null when the reader may not open them. */
  barrels: string | null;
  /** Where a call on a sample is recorded, or null when the reader makes none. */
  callHref: ((sample: SampleView) => string) | null;
}

function Part({ part, barrels, isWhole }: { part: ComponentView; barrels: string | null; isWhole: boolean }) {
  const name = `${VESSEL_WORDS[part.vesselKind]} ${part.vessel}`;
  return (
    <li>
      {!isWhole && `${showPercent(part.share)} `}
      {barrels ? <Link href={`${barrels}/barrels/${part.vesselId}`}>{name}</Link> : name} <span className="soft">{[part.lot, woodWords(part)].filter(Boolean).join(', ')}; pulled {part.pulledOn}</span>
    </li>
  );
}

/** The samples side by side: what they are, and where each stood out. */
export function SamplesTable({ samples, profile, styles, barrels, callHref }: Props) {
  const marks = (sample: number) => profile?.extremes.find((e) => e.sample === sample);
  const words = (names: string[] | undefined) => (names && names.length > 0 ? listWords(names.map((name) => name.toLowerCase())) : <span className="hint">nothing shown</span>);
  return (
    <table className="ledger folds">
      <thead>
        <tr>
          <th scope="col">Sample</th><th scope="col">What it is</th>
          {profile && <><th scope="col">More than others</th><th scope="col">Less than others</th></>}
          {callHref && <th scope="col"><span className="visually-hidden">Call</span></th>}
        </tr>
      </thead>
      <tbody>
        {samples.map((sample) => (
          <tr key={sample.sample}>
            <th scope="row"><span className="row" style={{ whiteSpace: 'nowrap' }}><Marker style={styles.get(sample.sample)!} /><b>{sample.label}</b>{sample.isControl && <span className="soft">control</span>}</span></th>
            <td>
              {sample.components.length === 0 ? <span className="soft">from outside the cellar</span> : <ul>{sample.components.map((part) => <Part key={part.fillId + part.pulledOn} part={part} barrels={barrels} isWhole={sample.components.length === 1} />)}</ul>}
            </td>
            {profile && (
              <>
                <td data-label="More than others:">{words(marks(sample.sample)?.highest)}</td>
                <td data-label="Less than others:">{words(marks(sample.sample)?.lowest)}</td>
              </>
            )}
            {callHref && <td className="num" style={{ whiteSpace: 'nowrap' }}>{sample.components.length > 0 && <Link href={callHref(sample)} aria-label={`Record the call on ${sample.label}`}>Record the call</Link>}</td>}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
