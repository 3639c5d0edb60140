import { FLIGHT_ORDERS } from '../orders-words';
import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'profile',
  name: 'Profile',
  answers: 'What do they taste like, and how much of it?',
  reportName: 'Profile on line scales (in the manner of ISO 13299)',
  sampleCount: { min: 2, max: 12 },
  unit: 'glass',
  glassesPerBlock: null,
  glassesPerSample: 1,
  items: { kind: 'line', from: 'chosen', min: 1, max: 60, label: 'Lines to score, none to very strong', hint: 'Six to twelve are enough for a glass.', hasFlags: true, asksLiking: false },
  chance: null,
  ballot: { kind: 'glasses' },
  scale: 'Line from 0 to 100 in steps of 1, anchored in words at both ends, no number shown before the touch',
  orders: FLIGHT_ORDERS,
};
