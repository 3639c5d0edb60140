import type { CallKind } from '@/db/enums';
import type { CallStatus } from './types';

export const CALL_WORDS: Record<CallKind, string> = {
  bottle: 'Bottle',
  hold: 'Hold',
  rack: 'Rack',
  top: 'Top',
  treat: 'Treat',
  blend: 'Blend',
  declassify: 'Declassify',
};

/** What the call's next date means. */
export const NEXT_DAY_WORDS: Record<CallKind, string> = {
  bottle: 'Bottle on',
  hold: 'Hold until',
  rack: 'Rack on',
  top: 'Top on',
  treat: 'Treat or look again on',
  blend: 'Blend or try on',
  declassify: 'Look again on',
};

export const STATUS_WORDS: Record<CallStatus, string> = {
  standing: 'stands',
  superseded: 'a later call stands',
  emptied: 'the fill has left the vessel',
  withdrawn: 'taken back',
};

const GAS = 'Carbon dioxide has no smell and gathers in closed rooms and tanks; sulfur dioxide burns eyes and lungs. Air the room, measure, never lean into a barrel, never work alone.';
const LABEL = 'Tercet prints no legal label: ask your authority what the label may say.';

/** The caution that a call meets, or null. Facts of law differ by country, so that they are only pointed at. */
export const CALL_CAUTIONS: Record<CallKind, string | null> = {
  bottle: `Sulfites, egg and milk may have to be named on the label. ${LABEL}`,
  hold: null,
  rack: `${GAS} Keep flames and sulfur wicks away from alcohol.`,
  top: `Ease the bung slowly: a sealed barrel pulls a vacuum, a fermenting one pushes gas. ${GAS}`,
  treat: `Additions, doses and processes are limited by local law, and some must be named on the label (egg, milk, sulfites). Follow your law and the maker’s sheet. ${GAS}`,
  blend: `A blend can change which vintage, place or variety the label may name. ${LABEL} ${GAS}`,
  declassify: `A lower class has label rules of its own. ${LABEL}`,
};
