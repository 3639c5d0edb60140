import 'server-only';
import type { Tx } from '@/db/client';
import type { Allergen, Method, Phase } from '@/db/enums';
import { ballotItems, descriptors, sampleComponents, samples, sessionPourers, sessions } from '@/db/schema';
import { and, eq } from 'drizzle-orm';
import { newId } from '../ids';

export interface DemoSession {
  method: Method;
  title: string;
  instruction: string;
  privateQuestion: string;
  /** Label and pull of each sample. */
  samples: { label: string; pullId: string }[];
  /** Descriptor keys of the ballot's lines, in phases. */
  lines: { key: string; phase: Phase }[];
  flags: string[];
  seats: number;
  reserves: number;
  replicates: number;
  servingTemperatureC: number;
  allergens: Allergen[];
  scheduledFor: Date;
  createdAt: Date;
}

/** Writes a draft session of the demo cellar, ready to be sealed. @returns its id */
export function insertDraft(tx: Tx, cellarId: string, leaderId: string, pourerId: string, demo: DemoSession): string {
  const sessionId = newId();
  tx.insert(sessions).values({
    id: sessionId, cellarId, state: 'draft', method: demo.method, title: demo.title, instruction: demo.instruction,
    privateQuestion: demo.privateQuestion, leaderId, scheduledFor: demo.scheduledFor, seatsPlanned: demo.seats,
    reservesPlanned: demo.reserves, replicates: demo.replicates, alpha: 0.05, servingTemperatureC: demo.servingTemperatureC,
    servingVolumeMl: 30, restS: 60, allergens: demo.allergens, createdAt: demo.createdAt,
  }).run();
  tx.insert(sessionPourers).values({ cellarId, sessionId, userId: pourerId }).run();
  demo.samples.forEach((sample, index) => {
    const sampleId = newId();
    tx.insert(samples).values({ id: sampleId, cellarId, sessionId, ordinal: index + 1, label: sample.label }).run();
    tx.insert(sampleComponents).values({ cellarId, sampleId, pullId: sample.pullId, share: 1 }).run();
  });
  const all = [...demo.lines.map((line) => ({ ...line, kind: 'line' as const })), ...demo.flags.map((key) => ({ key, phase: 'nose' as const, kind: 'flag' as const }))];
  const order: Phase[] = ['look', 'nose', 'palate', 'mouthfeel', 'after'];
  all.sort((a, b) => order.indexOf(a.phase) - order.indexOf(b.phase));
  all.forEach((line, index) => {
    const descriptor = tx.select().from(descriptors).where(and(eq(descriptors.cellarId, cellarId), eq(descriptors.key, line.key))).get();
    if (!descriptor) throw new Error(`the lexicon has no entry ${line.key}`);
    const { id: descriptorId, name, definition, lowAnchor, highAnchor } = descriptor;
    tx.insert(ballotItems).values({
      id: newId(), cellarId, sessionId, position: index + 1, phase: line.phase, kind: line.kind, descriptorId, name, definition, lowAnchor, highAnchor,
    }).run();
  });
  return sessionId;
}
