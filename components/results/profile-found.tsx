import { ProfileRadar } from '@/components/charts/profile-radar';
import type { SampleStyle } from '@/components/charts/styles';
import { shortName, woodWords } from '@/lib/results/format';
import type { ProfileView, SampleView } from '@/lib/results/types';
import { LineTable } from './line-table';
import { Statistics } from './statistics';

/** Up to so many samples the chart and the table stand side by side. */
const BESIDE = 4;

/** A radar with fewer axes is no shape. */
const FEWEST_AXES = 3;

const note = (sample: SampleView) => (sample.components.length === 1 ? woodWords(sample.components[0]!) : sample.isControl ? 'control' : '');

/** The profiles as a chart, and beside it the same in numbers with what was shown. */
export function ProfileFound({ profile, samples, styles }: { profile: ProfileView; samples: SampleView[]; styles: Map<number, SampleStyle> }) {
  const scored = profile.lines.filter((line) => line.cells.length > 0);
  const series = samples.map((sample) => ({
    sample: sample.sample, label: shortName(sample), note: note(sample), style: styles.get(sample.sample)!,
    values: scored.map((line) => line.cells.find((cell) => cell.sample === sample.sample)?.mean ?? null),
  }));
  const hasRadar = scored.length >= FEWEST_AXES;
  const isWide = samples.length > BESIDE || !hasRadar;
  if (scored.length === 0) return <p>Nobody scored a glass, so there is nothing to show.</p>;
  return (
    <div className="stack">
      <div className={isWide ? 'stack' : 'ev'}>
        {hasRadar && <ProfileRadar axes={scored.map((line) => line.name)} series={series} isWide={isWide} scale={profile.scale} />}
        <LineTable lines={profile.lines} samples={samples} styles={styles} alpha={profile.alpha} scale={profile.scale} />
      </div>
      <Statistics profile={profile} samples={samples} />
    </div>
  );
}
