'use client';

import dynamic from 'next/dynamic';
import { useState } from 'react';
import type { ScaleView } from '@/lib/results/types';
import { Marker } from './marker';
import type { RadarSeries } from './radar-chart';

/** More lines than this can't be told apart on one radar. */
const AT_ONCE = 6;

const RadarChart = dynamic(() => import('./radar-chart'), { ssr: false, loading: () => <p className="note" role="status">Drawing the chart. The table holds the same numbers.</p> });

export interface LegendSeries extends RadarSeries {
  note: string;
}

/** The radar with its legend; with more than six samples the legend chooses which are drawn. `isWide`: legend beside. */
export function ProfileRadar({ axes, series, isWide, scale }: { axes: string[]; series: LegendSeries[]; isWide: boolean; scale: ScaleView }) {
  const [drawn, setDrawn] = useState(() => series.slice(0, AT_ONCE).map((s) => s.sample));
  const mayChoose = series.length > AT_ONCE;
  const toggle = (sample: number) => setDrawn((now) => (now.includes(sample) ? now.filter((s) => s !== sample) : [...now, sample]));
  const name = (s: LegendSeries) => <><Marker style={s.style} /><b>{s.label}</b> <span className="soft">{s.note}</span></>;
  return (
    <figure className={isWide ? 'flex flex-wrap items-center gap-6' : 'stack tight'}>
      <div style={{ height: `min(${isWide ? 400 : 320}px, 76vw)`, flex: '0 1 540px', width: '100%', minWidth: 0 }}><RadarChart axes={axes} series={series.filter((s) => drawn.includes(s.sample))} scale={scale} /></div>
      <figcaption>
        {mayChoose && <p className="note">At most {AT_ONCE} at once: choose which.</p>}
        <ul className="stack tight" aria-label="Samples">
          {series.map((s) => (
            <li key={s.sample}>
              {mayChoose ? (
                <label className="tick-row">
                  <input type="checkbox" checked={drawn.includes(s.sample)} disabled={!drawn.includes(s.sample) && drawn.length >= AT_ONCE} onChange={() => toggle(s.sample)} />
                  <span className="row wrap">{name(s)}</span>
                </label>
              ) : <span className="row wrap">{name(s)}</span>}
            </li>
          ))}
        </ul>
      </figcaption>
    </figure>
  );
}
