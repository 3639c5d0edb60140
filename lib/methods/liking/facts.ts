import { FLIGHT_ORDERS } from '../orders-words';
import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'liking',
  name: 'Liking',
  answers: 'Do they like it, and which more?',
  reportName: 'Liking on nine points (in the manner of ISO 11136)',
  sampleCount: { min: 2, max: 12 },
  unit: 'glass',
  glassesPerBlock: null,
  glassesPerSample: 1,
  items: { kind: 'liking', from: 'none', min: 0, max: 0, label: '', hint: '', hasFlags: false, asksLiking: true },
  chance: null,
  ballot: { kind: 'glasses' },
  scale: 'Nine points from dislike extremely (1) to like extremely (9)',
  orders: FLIGHT_ORDERS,
};
