'use client';

import { useEffect, useState } from 'react';
import { Code } from '@/components/ui/code';

/** Whole seconds until a moment, counted once a second. */
export function useSecondsLeft(until: number | null): number {
  const [now, setNow] = useState(() => Date.now());
  useEffect(() => {
    if (until === null) return;
    const tick = setInterval(() => setNow(Date.now()), 500);
    return () => clearInterval(tick);
  }, [until]);
  return until === null ? 0 : Math.max(0, Math.ceil((until - now) / 1000));
}

function RestRing({ left, total, size = 240 }: { left: number; total: number; size?: number }) {
  const c = size / 2;
  const r = c - 4.5;
  const part = total > 0 ? Math.min(0.9999, left / total) : 0;
  const angle = 2 * Math.PI * part;
  const end = `${c + r * Math.sin(angle)} ${c - r * Math.cos(angle)}`;
  return (
    <svg width={size} height={size} viewBox={`0 0 ${size} ${size}`} role="img" aria-label={`${left} seconds left`}>
      <circle cx={c} cy={c} r={r} fill="none" stroke="var(--ctl)" strokeWidth={1} />
      {part > 0 && <path d={`M${c} ${c - r}A${r} ${r} 0 ${part > 0.5 ? 1 : 0} 1 ${end}`} fill="none" stroke="var(--mal)" strokeWidth={7} />}
      <text x={c} y={c} dy=".36em" textAnchor="middle" fontFamily="var(--f-sans)" fontSize={size * 0.36} fontWeight={560} fill="var(--ink)">{left}</text>
    </svg>
  );
}

/** Between two glasses or sets: the palate rests, the next code is told, the button opens by itself. */
export function RestScreen({ until, restS, nextWord, nextCode, onNext }: { until: number; restS: number; nextWord: string; nextCode: string; onNext(): void }) {
  const left = useSecondsLeft(until);
  return (
    <>
      <div className="rest-all">
        <RestRing left={left} total={restS} />
        <div>
          <h1>Spit, rinse, wait</h1>
          <p className="soft">Water first, then a plain cracker.</p>
        </div>
      </div>
      <footer className="foot-bar">
        <div className="say apart"><span>Then {nextWord}. Look for</span><Code code={nextCode} size="s" /></div>
        {left > 0 ? (
          <button type="button" className="btn btn-wait wide" disabled>Opens in {left} s</button>
        ) : (
          <button type="button" className="btn btn-main wide" onClick={onNext} autoFocus>Go on to {nextWord}</button>
        )}
      </footer>
    </>
  );
}
