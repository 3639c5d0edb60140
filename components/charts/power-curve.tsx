'use client';

import dynamic from 'next/dynamic';
import type { PowerChartProps } from './power-chart';

const PowerChart = dynamic(() => import('./power-chart'), { ssr: false, loading: () => <p className="note" role="status">Drawing the curve. The table holds the same numbers.</p> });

const KEY = { width: 14, height: 14, viewBox: '0 0 14 14', 'aria-hidden': true, style: { flex: 'none' } };

/** The curve with its legend in shapes and words. */
export function PowerCurve(props: PowerChartProps) {
  return (
    <figure className="stack tight">
      <div style={{ height: 'min(300px, 76vw)', width: '100%', minWidth: 0, position: 'relative' }}><PowerChart {...props} /></div>
      <figcaption className="row wrap note">
        <span className="row"><svg {...KEY}><circle cx={7} cy={7} r={5} fill="var(--d1)" /></svg>the panel at hand</span>
        <span className="row"><svg {...KEY}><path d="M7 2l5.5 10h-11z" fill="var(--d3)" /></svg>the smallest panel</span>
        <span className="row"><svg {...KEY}><path d="M0 7h14" stroke="var(--ink-3)" strokeWidth={2} strokeDasharray="3 3" /></svg>the goal</span>
      </figcaption>
    </figure>
  );
}
