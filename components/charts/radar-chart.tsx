'use client';

import { Chart as ChartJs, Filler, LineElement, PointElement, RadialLinearScale, type ChartOptions, type PointStyle } from 'chart.js';
import { Radar } from 'react-chartjs-2';
import type { ScaleView } from '@/lib/results/types';
import { useCanvas } from './canvas';
import { stepOf } from './interval-plot';
import type { SampleStyle, Shape } from './styles';

ChartJs.register(RadialLinearScale, PointElement, LineElement, Filler);

export interface RadarSeries {
  sample: number;
  label: string;
  style: SampleStyle;
  values: (number | null)[];
}

const POINTS: Record<Shape, PointStyle> = { circle: 'circle', square: 'rect', triangle: 'triangle', diamond: 'rectRot', cross: 'crossRot', bar: 'dash' };

/** Breaks a long name into lines of at most two words. */
const inLines = (name: string): string | string[] => {
  const words = name.split(' ');
  return words.length < 3 ? name : [words.slice(0, 2).join(' '), words.slice(2).join(' ')];
};

/** Top of the scale: the step above the highest mean. */
const topOf = (series: readonly RadarSeries[], ends: ScaleView) => {
  const step = stepOf(ends);
  return step < 20 ? ends.high : Math.min(ends.high, step * Math.ceil((Math.max(step, ...series.flatMap((s) => s.values.map((v) => v ?? 0))) + 1) / step));
};

/** Mean profiles on a radar. Drawn in the browser only; the table beside holds the same numbers. */
export default function RadarChart({ axes, series, scale }: { axes: string[]; series: RadarSeries[]; scale: ScaleView }) {
  const { mode, token, font } = useCanvas();
  const options: ChartOptions<'radar'> = {
    animation: false,
    maintainAspectRatio: false,
    layout: { padding: 4 },
    plugins: { legend: { display: false }, tooltip: { enabled: false } },
    scales: {
      r: {
        min: scale.low,
        max: topOf(series, scale),
        grid: { color: token('--rule') },
        angleLines: { color: token('--rule') },
        pointLabels: { color: token('--ink'), font },
        ticks: { stepSize: stepOf(scale), color: token('--ink-2'), backdropColor: token('--ground'), font: { ...font, size: 12 } },
      },
    },
  };
  const datasets = series.map(({ label, style, values }) => {
    const colour = token(style.colour);
    return {
      label, data: values, borderColor: colour, borderDash: style.dash, borderWidth: 2, fill: false, spanGaps: false, pointStyle: POINTS[style.shape],
      pointBackgroundColor: style.isHollow ? token('--ground') : colour, pointBorderColor: colour, pointBorderWidth: style.isHollow || style.shape === 'cross' || style.shape === 'bar' ? 2 : 1, pointRadius: 4,
    };
  });
  return <Radar key={mode} data={{ labels: axes.map(inLines), datasets }} options={options} role="img" aria-label={`Mean profiles of ${series.map((s) => s.label).join(', ')}. The table holds the same numbers.`} />;
}
