import 'server-only';
import { ballotItems, sampleComponents, samples, sessionPourers } from '@/db/schema';
import type { Db, Tx } from '@/db/client';
import { and, eq } from 'drizzle-orm';
import { factsOf } from '../methods/facts';
import type { SessionRow } from './find';

/** What still keeps a draft from being sealed, in words for the leader; empty when nothing does. */
export function listMissing(db: Tx | Db, session: SessionRow): string[] {
  const method = factsOf(session.method);
  const missing: string[] = [];
  const own = db.select().from(samples).where(and(eq(samples.sessionId, session.id), eq(samples.cellarId, session.cellarId))).all();
  const { min, max } = method.sampleCount;
  if (own.length < min || own.length > max) {
    missing.push(min === max ? `${method.name} takes ${min} samples; there ${own.length === 1 ? 'is 1' : `are ${own.length}`}.` : `${method.name} takes ${min} to ${max} samples; there ${own.length === 1 ? 'is 1' : `are ${own.length}`}.`);
  }
  for (const sample of own) {
    if (sample.isControl) continue;
    const parts = db.select().from(sampleComponents).where(eq(sampleComponents.sampleId, sample.id)).all();
    const total = parts.reduce((sum, part) => sum + part.share, 0);
    if (parts.length === 0) missing.push(`${sample.label} has no pull.`);
    else if (Math.abs(total - 1) > 1e-6) missing.push(`The parts of ${sample.label} add up to ${Math.round(total * 100)} %, not 100 %.`);
  }
  if (method.items?.from === 'chosen') {
    const { kind, min } = method.items;
    const lines = db.select().from(ballotItems).where(and(eq(ballotItems.sessionId, session.id), eq(ballotItems.kind, kind))).all();
    if (lines.length < min) missing.push(lines.length === 0 ? 'The ballot has no descriptor to ask for.' : `The ballot asks for ${min} descriptors at least; there is ${lines.length}.`);
  }
  return [...missing, ...missingPeople(db, session)];
}

function missingPeople(db: Tx | Db, session: SessionRow): string[] {
  const named = db.select().from(sessionPourers).where(eq(sessionPourers.sessionId, session.id)).all();
  if (session.coding === 'pourer') return named.length === 0 ? ['Nobody is named to pour: without a pourer nobody could read which bottle gets which code.'] : [];
  const missing: string[] = [];
  // In a set of glasses letters would tell which are alike, and so the answer.
  if (factsOf(session.method).glassesPerBlock !== null) missing.push(`${factsOf(session.method).name} can’t be coded in two steps: who marks the glasses of a set would see which are alike. Name a pourer who does not taste.`);
  if (!named.some(({ step }) => step === 'letters')) missing.push('Nobody is named to fill the lettered bottles.');
  if (!named.some(({ step }) => step === 'codes')) missing.push('Nobody is named to mark letters with codes.');
  return missing;
}
