import { MarkerAt } from './marker';
import type { SampleStyle } from './styles';

export interface Interval {
  sample: number;
  mean: number;
  low: number | null;
  high: number | null;
}

const WIDTH = 216;
const STEP = 10;
const PAD = 6;
const TICKS = [0, 25, 50, 75, 100];
const at = (value: number) => PAD + ((WIDTH - 2 * PAD) * Math.min(100, Math.max(0, value))) / 100;

/** The figures of the scale, for the head of the column. */
export function PlotAxis() {
  return (
    <svg width={WIDTH} height={16} viewBox={`0 0 ${WIDTH} 16`} aria-hidden fontSize={13} fill="var(--ink-2)">
      {TICKS.map((tick) => <text key={tick} x={at(tick)} y={12} textAnchor={tick === 0 ? 'start' : tick === 100 ? 'end' : 'middle'} dx={tick === 0 ? -PAD + 1 : tick === 100 ? PAD - 1 : 0}>{tick}</text>)}
    </svg>
  );
}

/** Means with their intervals on the line from 0 to 100; the cells beside hold the same numbers. */
export function IntervalPlot({ intervals, styles, isDim }: { intervals: readonly Interval[]; styles: Map<number, SampleStyle>; isDim: boolean }) {
  const height = STEP * intervals.length + 7;
  return (
    <svg width={WIDTH} height={height} viewBox={`0 0 ${WIDTH} ${height}`} aria-hidden opacity={isDim ? 0.6 : 1}>
      {TICKS.map((tick) => <path key={tick} d={`M${at(tick)} 0V${height}`} stroke="var(--rule)" />)}
      {intervals.map(({ sample, mean, low, high }, row) => {
        const style = styles.get(sample);
        if (!style) return null;
        const y = STEP * row + 8.5;
        return (
          <g key={sample}>
            {low !== null && high !== null && <path d={`M${at(low)} ${y}H${at(high)}`} stroke={`var(${style.colour})`} strokeWidth={2} />}
            <MarkerAt style={style} x={at(mean)} y={y} r={3.8} />
          </g>
        );
      })}
    </svg>
  );
}
