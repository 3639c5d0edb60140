import type { DrawMethod, Phase } from '@/db/enums';
import { TOAST_WORDS, VESSEL_WORDS } from '../register/format';
import type { ComponentView, SampleView } from './types';

/** A p-value to three digits; below that it is "<0.001". */
export const showP = (p: number): string => (p < 0.001 ? '<0.001' : p.toFixed(3));

/** p in a sentence: "p = 0.012", "p < 0.001". */
export const sayP = (p: number): string => (p < 0.001 ? 'p < 0.001' : `p = ${p.toFixed(3)}`);

export const showScore = (value: number): string => value.toFixed(1);

export const showPercent = (share: number): string => `${Math.round(share * 100)}\u00a0%`;

/** "12", "12 and 31", "12, 31 and 47". */
export function listWords(words: readonly (string | number)[], last = 'and'): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} ${last} ${words[words.length - 1]}`;
}

/** "1 panelist", "3 panelists"; "2 people". */
export const count = (n: number, word: string, many = `${word}s`): string => `${n} ${n === 1 ? word : many}`;

export const PHASE_WORDS: Record<Phase, string> = { look: 'look', nose: 'nose', palate: 'palate', mouthfeel: 'mouthfeel', after: 'after' };

export const DRAW_WORDS: Record<DrawMethod, string> = { thief: 'by thief', nail: 'at the nail', spigot: 'from the spigot' };

/** The short name of a sample in a table's head: the barrel's own name, or its label. */
export function shortName(sample: Pick<SampleView, 'label' | 'components' | 'isControl'>): string {
  const only = sample.components.length === 1 ? sample.components[0] : undefined;
  return only && sample.label === `${VESSEL_WORDS[only.vesselKind]} ${only.vessel}` ? only.vessel : sample.label;
}

/** Cooper, toast and age of a sample's barrel in a few words. */
export function woodWords(component: ComponentView): string {
  return [component.cooper, component.toast && TOAST_WORDS[component.toast], component.year].filter(Boolean).join(', ');
}
