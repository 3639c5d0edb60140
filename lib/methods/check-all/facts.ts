import { FLIGHT_ORDERS } from '../orders-words';
import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'check_all',
  name: 'Check all that apply',
  answers: 'Which words fit which sample?',
  reportName: 'Check all that apply',
  sampleCount: { min: 2, max: 12 },
  unit: 'glass',
  glassesPerBlock: null,
  glassesPerSample: 1,
  items: { kind: 'check', from: 'chosen', min: 2, max: 60, label: 'Words to tick where they fit', hint: 'Ten to thirty, each plain to somebody untrained.', hasFlags: false, asksLiking: true },
  chance: null,
  ballot: { kind: 'glasses' },
  scale: 'Each word ticked or not, in the same order for all; overall liking on nine points',
  orders: FLIGHT_ORDERS,
};
