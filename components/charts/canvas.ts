'use client';

import { useSyncExternalStore } from 'react';

/** Tells when the light of the screen changes, so that the canvas takes the other colours. */
function subscribeMode(onChange: () => void): () => void {
  const observer = new MutationObserver(onChange);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-mode'] });
  return () => observer.disconnect();
}

const readMode = () => document.documentElement.dataset.mode ?? 'paper';

/** Values of tokens in the present light: a canvas can't take `var()`. */
function tokenReader(): (name: string) => string {
  const computed = getComputedStyle(document.documentElement);
  return (name) => computed.getPropertyValue(name).trim();
}

/** The look for a drawing on a canvas, in the browser only. `mode`: a key that makes it be drawn anew. */
export function useCanvas(): { mode: string; token: (name: string) => string; font: { family: string; size: number } } {
  const mode = useSyncExternalStore(subscribeMode, readMode, () => 'paper');
  return { mode, token: tokenReader(), font: { family: getComputedStyle(document.body).fontFamily, size: 13 } };
}
