'use client';

import { MODE_COOKIE, type Mode } from '@/lib/mode';

const YEAR_S = 365 * 24 * 60 * 60;

/** Switches the light at once and remembers it on this device. */
function choose(mode: Mode): void {
  document.documentElement.dataset.mode = mode;
  document.cookie = `${MODE_COOKIE}=${mode}; path=/; max-age=${YEAR_S}; samesite=lax`;
}

export function ModeSwitch() {
  return (
    <span className="two" role="group" aria-label="Light">
      <button type="button" className="p" onClick={() => choose('paper')}>Paper</button>
      <button type="button" className="c" onClick={() => choose('cellar')}>Cellar</button>
    </span>
  );
}
