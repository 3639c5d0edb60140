import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'two_of_five',
  name: 'Two out of five',
  answers: 'Is there a difference at all, with few people and plenty of wine?',
  reportName: 'Two-out-of-five test (in the manner of ISO 6658)',
  sampleCount: { min: 2, max: 2 },
  unit: 'set',
  glassesPerBlock: 5,
  glassesPerSample: 2.5,
  items: null,
  chance: 1 / 10,
  ballot: { kind: 'pick', picks: 2, hasReference: false, asksGuess: true },
  scale: 'Choice of the two glasses of five that are alike and unlike the other three; a guess is said',
  orders: 'The twenty orders, dealt in blocks of twenty and drawn anew for each set',
};
