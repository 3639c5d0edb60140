import { MarkerAt } from './marker';
import type { ScaleView } from '@/lib/results/types';
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

/** The part of a scale that a plot shows, in whole steps. */
export interface Range {
  from: number;
  to: number;
  step: number;
}

/** Steps of the axis: twenties on a line of 100, ones or twos on a short scale. */
export const stepOf = ({ low, high }: ScaleView): number => (high - low >= 50 ? 20 : high - low > 6 ? 2 : 1);

/** The steps that hold all the intervals; at least two of them. A short scale is shown whole. */
export function rangeOf(intervals: readonly Interval[], ends: ScaleView): Range {
  const step = stepOf(ends);
  const values = intervals.flatMap((i) => [i.low ?? i.mean, i.high ?? i.mean]);
  if (values.length === 0 || step < 20) return { from: ends.low, to: ends.high, step };
  const from = Math.max(ends.low, step * Math.floor(Math.min(...values) / step));
  const to = Math.min(ends.high, step * Math.ceil(Math.max(...values) / step));
  return to - from >= 2 * step ? { from, to, step } : { from: Math.min(from, ends.high - 2 * step), to: Math.min(from, ends.high - 2 * step) + 2 * step, step };
}

const scale = ({ from, to }: Range) => (value: number) => PAD + ((WIDTH - 2 * PAD) * (Math.min(to, Math.max(from, value)) - from)) / (to - from);
const ticksOf = ({ from, to, step }: Range) => Array.from({ length: Math.floor((to - from) / step) + 1 }, (_, i) => from + step * i);

/** The figures of the scale, for the head of the column. */
export function PlotAxis({ range }: { range: Range }) {
  const at = scale(range);
  const anchor = (tick: number) => (tick === range.from ? 'start' : tick === range.to ? 'end' : 'middle');
  const shift = (tick: number) => (tick === range.from ? 1 - PAD : tick === range.to ? PAD - 1 : 0);
  return (
    <svg width={WIDTH} height={16} viewBox={`0 0 ${WIDTH} 16`} aria-hidden fontSize={13} fill="var(--ink-2)">
      {ticksOf(range).map((tick) => <text key={tick} x={at(tick) + shift(tick)} y={12} textAnchor={anchor(tick)}>{tick}</text>)}
    </svg>
  );
}

/** Means with their intervals; the cells beside hold the same numbers. */
export function IntervalPlot({ intervals, range, styles, isDim }: { intervals: readonly Interval[]; range: Range; styles: Map<number, SampleStyle>; isDim: boolean }) {
  const at = scale(range);
  const height = STEP * intervals.length + 7;
  return (
    <svg width={WIDTH} height={height} viewBox={`0 0 ${WIDTH} ${height}`} aria-hidden opacity={isDim ? 0.6 : 1}>
      {ticksOf(range).map((tick) => <path key={tick} d={`M${at(tick)} 0V${height}`} stroke="var(--rule)" />)}
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
