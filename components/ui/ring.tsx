export type RingState = 'to-come' | 'open' | 'done' | 'waits';

/**
 * The one motif: thin *to come*, open *now*, solid *done*, barred *waits for somebody*.
 * It is never alone: a word stands beside it (or is given as `label`).
 */
export function Ring({ state, size = 16, label }: { state: RingState; size?: number; label?: string }) {
  const c = size / 2;
  const said = label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true };
  return (
    <svg width={size} height={size} viewBox={`0 0 ${size} ${size}`} {...said}>
      {state === 'to-come' && <circle cx={c} cy={c} r={c - 1.25} fill="none" stroke="var(--ctl)" strokeWidth={1} />}
      {state === 'done' && <circle cx={c} cy={c} r={c - 0.75} fill="var(--ink-2)" />}
      {state === 'open' && <path d={openRing(c)} fill="none" stroke="var(--mal)" strokeWidth={2.5} />}
      {state === 'waits' && (
        <>
          <circle cx={c} cy={c} r={c - 1.5} fill="none" stroke="var(--warn)" strokeWidth={2} />
          <path d={`M${c - 2.5} ${c}h5`} stroke="var(--warn)" strokeWidth={2} />
        </>
      )}
    </svg>
  );
}

/** The path of a ring of radius c − 2 that is open at the upper right. */
function openRing(c: number): string {
  const r = c - 2;
  const gap = 0.035 * r;
  return `M${c + r} ${c - gap}A${r} ${r} 0 1 1 ${c + gap} ${c - r}`;
}
