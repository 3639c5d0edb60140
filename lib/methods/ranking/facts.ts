import { FLIGHT_ORDERS } from '../orders-words';
import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'ranking',
  name: 'Ranking',
  answers: 'In which order do they stand?',
  reportName: 'Ranking (in the manner of ISO 8587)',
  sampleCount: { min: 3, max: 10 },
  unit: 'set',
  glassesPerBlock: null,
  glassesPerSample: 1,
  items: { kind: 'ask', from: 'chosen', min: 1, max: 1, label: 'What to rank by, least first', hint: 'One trait.', hasFlags: false, asksLiking: false },
  chance: null,
  ballot: { kind: 'order' },
  scale: 'Forced order without ties, from least to most',
  orders: FLIGHT_ORDERS,
};
