'use client';

import { Chart as ChartJs, LinearScale, LineElement, PointElement, type ChartOptions } from 'chart.js';
import { Line } from 'react-chartjs-2';
import { useCanvas } from './canvas';

ChartJs.register(LinearScale, PointElement, LineElement);

export interface PowerChartProps {
  curve: readonly { n: number; power: number }[];
  goal: number;
  atHand: { n: number; power: number };
  smallest: { n: number; power: number } | null;
  /** What the heights are the chance of. */
  said: string;
}

/** A power curve with its goal, the panel at hand and the smallest one. The table beside holds the numbers. */
export default function PowerChart({ curve, goal, atHand, smallest, said }: PowerChartProps) {
  const { mode, token, font } = useCanvas();
  const end = curve.at(-1)!.n;
  const axis = (text: string) => ({ display: true, text, color: token('--ink-2'), font });
  const ticks = { color: token('--ink-2'), font: { ...font, size: 12 } };
  const options: ChartOptions<'line'> = {
    animation: false,
    maintainAspectRatio: false,
    parsing: false,
    layout: { padding: 4 },
    plugins: { legend: { display: false }, tooltip: { enabled: false } },
    scales: {
      x: { type: 'linear', min: 0, max: end, title: axis('answers'), grid: { color: token('--rule') }, ticks },
      y: { min: 0, max: 1, title: axis('chance'), grid: { color: token('--rule') }, ticks: { ...ticks, stepSize: 0.2, callback: (value) => `${Math.round(100 * Number(value))} %` } },
    },
  };
  const mark = ({ n, power }: { n: number; power: number }) => [{ x: Math.min(n, end), y: power }];
  const ground = token('--ground');
  const datasets = [
    { label: 'at hand', data: mark(atHand), pointStyle: 'circle' as const, pointRadius: 7, pointBackgroundColor: token('--d1'), pointBorderColor: ground, pointBorderWidth: 2 },
    ...(smallest && smallest.n <= end ? [{ label: 'smallest', data: mark(smallest), pointStyle: 'triangle' as const, pointRadius: 8, pointBackgroundColor: token('--d3'), pointBorderColor: ground, pointBorderWidth: 2 }] : []),
    { label: 'goal', data: [{ x: 0, y: goal }, { x: end, y: goal }], borderColor: token('--ink-3'), borderDash: [3, 3], borderWidth: 2, pointRadius: 0 },
    { label: 'chance', data: curve.map(({ n, power }) => ({ x: n, y: power })), borderColor: token('--d1'), borderWidth: 2, pointRadius: 0 },
  ];
  return <Line key={mode} data={{ datasets }} options={options} role="img" aria-label={`${said}, from 1 to ${end} answers. The table holds the same numbers.`} />;
}
