import { FLIGHT_ORDERS } from '../orders-words';
import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'rate_all',
  name: 'Rate all that apply',
  answers: 'Which words fit, and how strongly?',
  reportName: 'Rate all that apply',
  sampleCount: { min: 2, max: 12 },
  unit: 'glass',
  glassesPerBlock: null,
  glassesPerSample: 1,
  items: { kind: 'rate', from: 'chosen', min: 2, max: 60, label: 'Words to rate where they fit', hint: 'Ten to thirty.', hasFlags: false, asksLiking: false },
  chance: null,
  ballot: { kind: 'glasses' },
  scale: 'Each word left out (0) or rated 1 slight, 2 clear, 3 strong',
  orders: FLIGHT_ORDERS,
};
