import { FLIGHT_ORDERS } from '../orders-words';
import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'free_note',
  name: 'Free note',
  answers: 'What would they say of it in their own words?',
  reportName: 'Free description with the cellar’s lexicon',
  sampleCount: { min: 1, max: 12 },
  unit: 'glass',
  glassesPerBlock: null,
  glassesPerSample: 1,
  items: { kind: 'term', from: 'whole', min: 0, max: 400, label: '', hint: '', hasFlags: false, asksLiking: false },
  chance: null,
  ballot: { kind: 'note' },
  scale: 'Free text; descriptors of the lexicon found in it, confirmed by the panelist and rated 1 slight, 2 clear, 3 strong',
  orders: FLIGHT_ORDERS,
};
