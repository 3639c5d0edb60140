import 'server-only';
import { getDb } from '@/db/client';
import { loadAccess, type Access } from '../auth/access';
import { readHalfKey, readKeyForPouring, type HalfKey, type PouringKey } from '../blind/read-key';
import { asAppError } from '../errors';
import { factsOf } from '../methods/facts';
import { UNIT_WORDS } from '../methods/types';
import { seatLabel } from '../seats/format';
import { findSession, type SessionRow } from '../sessions/find';
import { showMoment } from '../time';
import { now } from '../clock';

export interface PourSheet {
  title: string;
  pourer: string;
  serving: string;
  printedAt: string;
  commitment: string;
  /** Every glass has a code of its own, so that no bottle can carry one. */
  hasOwnCodes: boolean;
  blockWord: string;
  /** One to a bottle (a code for each sample and block), or to a sample with all its glasses. */
  bottles: { block: number; code: string | null; label: string; glasses: number; volumeMl: number; codes: string[] }[];
  blocks: { block: number; rows: { seat: string; glasses: { code: string; label: string }[] }[] }[];
}

/** One half of two-step coding on paper. */
export interface HalfSheet {
  step: HalfKey['step'];
  title: string;
  person: string;
  serving: string;
  printedAt: string;
  commitment: string;
  /** Step one: what goes into which bottle, with millilitres. */
  letters: { letter: string; label: string; volumeMl: number }[];
  /** Step two: which codes each bottle gets, and where the glasses go. */
  codes: { block: number; bottles: { letter: string; code: string }[]; rows: { seat: string; codes: string[] }[] }[];
}

const servingWords = (session: SessionRow) => [session.servingTemperatureC === null ? null : `${session.servingTemperatureC} °C`, `${session.servingVolumeMl} mL`, 'covered'].filter(Boolean).join(', ');

function halfSheet(access: Access, session: SessionRow, key: HalfKey): HalfSheet {
  const seats = session.seatsPlanned + session.reservesPlanned;
  const servings = key.step === 'codes' ? key.servings : [];
  return {
    step: key.step, title: session.title, person: access.user.name, serving: servingWords(session), printedAt: showMoment(now(), access.cellar.timeZone), commitment: key.commitment,
    letters: key.step === 'letters' ? key.bottles.map((bottle) => ({ ...bottle, volumeMl: (seats * session.replicates + 1) * session.servingVolumeMl })) : [],
    codes: key.step === 'codes' ? [...new Set(servings.map((serving) => serving.block))].sort((a, b) => a - b).map((block) => ({
      block,
      bottles: key.bottles.filter((bottle) => bottle.block === block).map(({ letter, code }) => ({ letter, code })),
      rows: Array.from({ length: seats }, (_, i) => ({
        seat: seatLabel(i + 1, i + 1 > session.seatsPlanned, session.seatsPlanned),
        codes: servings.filter((serving) => serving.block === block && serving.seat === i + 1).sort((a, b) => a.position - b.position).map((serving) => serving.code),
      })),
    })) : [],
  };
}

function bottlesOf(key: PouringKey, hasOwnCodes: boolean, servingMl: number): PourSheet['bottles'] {
  const label = new Map(key.samples.map((sample) => [sample.sample, sample.label]));
  const groups = new Map<string, PouringKey['servings']>();
  for (const serving of key.servings) {
    const name = hasOwnCodes ? `${serving.sample}` : `${serving.block}/${serving.code}`;
    groups.set(name, [...(groups.get(name) ?? []), serving]);
  }
  return [...groups.values()]
    .map((servings) => ({
      block: hasOwnCodes ? 0 : servings[0]!.block,
      code: hasOwnCodes ? null : servings[0]!.code,
      label: label.get(servings[0]!.sample)!,
      glasses: servings.length,
      volumeMl: (servings.length + 1) * servingMl,
      codes: servings.map((serving) => serving.code).sort(),
    }))
    .sort((a, b) => a.block - b.block || a.label.localeCompare(b.label, 'en', { numeric: true }));
}

/**
 * The pour sheet for a named pourer; `refusal` says why for anybody else.
 * @throws AppError `not_found`
 */
export async function loadPourSheet(slug: string, sessionId: string): Promise<{ access: Access; sheet: PourSheet | null; half: HalfSheet | null; refusal: string | null; title: string }> {
  const access = await loadAccess(slug, 'session.list');
  const session = findSession(getDb(), access.cellar.id, sessionId);
  const halfKey = session.unsealedAt === null ? readHalfKey(access, sessionId) : null;
  if (halfKey) return { access, sheet: null, half: halfSheet(access, session, halfKey), refusal: null, title: session.title };
  let key: PouringKey;
  try {
    key = readKeyForPouring(access, sessionId);
  } catch (error) {
    const known = asAppError(error);
    if (known?.code !== 'forbidden') throw error;
    return { access, sheet: null, half: null, refusal: known.message, title: session.title };
  }
  const facts = factsOf(key.method);
  const hasOwnCodes = facts.glassesPerBlock !== null;
  const label = new Map(key.samples.map((sample) => [sample.sample, sample.label]));
  const seats = [...new Set(key.servings.map((serving) => serving.seat))].sort((a, b) => a - b);
  const blocks = [...new Set(key.servings.map((serving) => serving.block))].sort((a, b) => a - b);
  return {
    access,
    half: null,
    refusal: null,
    title: session.title,
    sheet: {
      title: session.title,
      pourer: access.user.name,
      serving: servingWords(session),
      printedAt: showMoment(now(), access.cellar.timeZone),
      commitment: key.commitment,
      hasOwnCodes,
      blockWord: UNIT_WORDS[hasOwnCodes ? 'set' : 'glass'].block.toLowerCase(),
      bottles: bottlesOf(key, hasOwnCodes, session.servingVolumeMl),
      blocks: blocks.map((block) => ({
        block,
        rows: seats.map((seat) => ({
          seat: seatLabel(seat, seat > session.seatsPlanned, session.seatsPlanned),
          glasses: key.servings
            .filter((serving) => serving.block === block && serving.seat === seat)
            .sort((a, b) => a.position - b.position)
            .map((serving) => ({ code: serving.code, label: label.get(serving.sample)! })),
        })),
      })),
    },
  };
}
