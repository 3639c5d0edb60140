import { FLIGHT_ORDERS } from '../orders-words';
import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'just_right',
  name: 'Just about right',
  answers: 'How much of it is right?',
  reportName: 'Just-about-right scales with penalty analysis',
  sampleCount: { min: 1, max: 12 },
  unit: 'glass',
  glassesPerBlock: null,
  glassesPerSample: 1,
  items: { kind: 'just_right', from: 'chosen', min: 1, max: 20, label: 'Traits that can be too little or too much', hint: 'Only what the cellar could change.', hasFlags: false, asksLiking: true },
  chance: null,
  ballot: { kind: 'glasses' },
  scale: 'Five points from far too little (1) by just right (3) to far too much (5); overall liking on nine points',
  orders: FLIGHT_ORDERS,
};
