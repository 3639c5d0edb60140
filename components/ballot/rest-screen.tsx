'use client';

import { useEffect, useRef } from 'react';
import { useWords } from '@/components/i18n/words';
import { useSecondsLeft } from '@/components/phone/use-seconds-left';
import { Code } from '@/components/ui/code';
import { chime } from '@/lib/phone/feel';

function RestRing({ left, total, label, size = 240 }: { left: number; total: number; label: string; size?: number }) {
  const c = size / 2;
  const r = c - 4.5;
  const part = total > 0 ? Math.min(0.9999, left / total) : 0;
  const angle = 2 * Math.PI * part;
  const end = `${c + r * Math.sin(angle)} ${c - r * Math.cos(angle)}`;
  return (
    <svg width={size} height={size} viewBox={`0 0 ${size} ${size}`} role="img" aria-label={label}>
      <circle cx={c} cy={c} r={r} fill="none" stroke="var(--ctl)" strokeWidth={1} />
      {part > 0 && <path d={`M${c} ${c - r}A${r} ${r} 0 ${part > 0.5 ? 1 : 0} 1 ${end}`} fill="none" stroke="var(--mal)" strokeWidth={7} />}
      <text x={c} y={c} dy=".36em" textAnchor="middle" fontFamily="var(--f-sans)" fontSize={size * 0.36} fontWeight={560} fill="var(--ink)">{left}</text>
    </svg>
  );
}

interface Props {
  until: number;
  restS: number;
  /** Which glass or set comes next. */
  next: { kind: 'Glass' | 'Set'; n: number; code: string };
  onNext(): void;
}

/** Between two glasses or sets: the palate rests, the next code is told, the button opens by itself. */
export function RestScreen({ until, restS, next, onNext }: Props) {
  const t = useWords();
  const left = useSecondsLeft(until);
  const wasResting = useRef(false);
  useEffect(() => {
    if (left === 0 && wasResting.current) chime();
    wasResting.current = left > 0;
  }, [left]);
  return (
    <>
      <div className="rest-all">
        <RestRing left={left} total={restS} label={t('rest.left', { n: left })} />
        <div>
          <h1>{t('rest.title')}</h1>
          <p className="soft">{t('rest.how')}</p>
        </div>
      </div>
      <footer className="foot-bar">
        <div className="say apart"><span>{t(`rest.then${next.kind}`, { n: next.n })}</span><Code code={next.code} size="s" label={t('common.codeWord')} /></div>
        {left > 0 ? (
          <button type="button" className="btn btn-wait wide" disabled>{t('rest.opens', { n: left })}</button>
        ) : (
          <button type="button" className="btn btn-main wide" onClick={onNext} autoFocus>{t(`rest.go${next.kind}`, { n: next.n })}</button>
        )}
      </footer>
    </>
  );
}
