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

/** The part of the line from 0 to 100 that a plot shows, in whole twenties. */
export interface Range {
  from: number;
  to: number;
}

/** The twenties that hold all the intervals; at least two of them. */
export function rangeOf(intervals: readonly Interval[]): Range {
  const ends = intervals.flatMap((i) => [i.low ?? i.mean, i.high ?? i.mean]);
  if (ends.length === 0) return { from: 0, to: 100 };
  const from = Math.max(0, 20 * Math.floor(Math.min(...ends) / 20));
  const to = Math.min(100, 20 * Math.ceil(Math.max(...ends) / 20));
  return to - from >= 40 ? { from, to } : { from: Math.min(from, 60), to: Math.min(from, 60) + 40 };
}

const scale = ({ from, to }: Range) => (value: number) => PAD + ((WIDTH - 2 * PAD) * (Math.min(to, Math.max(from, value)) - from)) / (to - from);
const ticksOf = ({ from, to }: Range) => Array.from({ length: (to - from) / 20 + 1 }, (_, i) => from + 20 * i);

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
