import { FLIGHT_ORDERS } from '../orders-words';
import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'category_profile',
  name: 'Category profile',
  answers: 'What do they taste like, in words of strength?',
  reportName: 'Profile on labelled categories (in the manner of ISO 13299 and ISO 4121)',
  sampleCount: { min: 2, max: 12 },
  unit: 'glass',
  glassesPerBlock: null,
  glassesPerSample: 1,
  items: { kind: 'category', from: 'chosen', min: 1, max: 60, label: 'Traits to grade, none to very strong', hint: 'Six to twelve are enough for a glass.', hasFlags: true, asksLiking: false },
  chance: null,
  ballot: { kind: 'glasses' },
  scale: 'Six categories in words, from none (0) to very strong (5), none chosen beforehand',
  orders: FLIGHT_ORDERS,
};
