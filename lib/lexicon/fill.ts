import 'server-only';
import type { Db, Tx } from '@/db/client';
import type { Phase, Sense } from '@/db/enums';
import { descriptors } from '@/db/schema';
import { now } from '../clock';
import { newId } from '../ids';
import lexicon from './lexicon.json';

const PHASE_OF: Record<Sense, Phase> = { appearance: 'look', aroma: 'nose', fault: 'nose', taste: 'palate', mouthfeel: 'mouthfeel' };

/** Entries whose place in the tasting, or whose ends of the line, differ from their sense's. */
const PHASE_EXCEPTIONS: Record<string, Phase> = { 'ta-length': 'after' };
const ANCHOR_EXCEPTIONS: Record<string, [string, string]> = {
  'ta-length': ['short', 'very long'],
  'mf-body': ['thin', 'very full'],
  'vi-clear': ['cloudy', 'brilliant'],
  'vi-depth': ['pale', 'very deep'],
};

/** Gives a new cellar the built-in lexicon; from there on its words are the cellar's own. */
export function fillLexicon(tx: Tx | Db, cellarId: string): void {
  const createdAt = now();
  for (const entry of lexicon) {
    const sense = entry.sense as Sense;
    const [lowAnchor, highAnchor] = ANCHOR_EXCEPTIONS[entry.id] ?? ['none', 'very strong'];
    tx.insert(descriptors).values({
      id: newId(), cellarId, key: entry.id, sense, family: entry.family, name: entry.name, definition: entry.definition,
      reference: entry.reference, phase: PHASE_EXCEPTIONS[entry.id] ?? PHASE_OF[sense], lowAnchor, highAnchor, createdAt,
    }).run();
  }
}
