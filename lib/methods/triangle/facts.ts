import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'triangle',
  name: 'Triangle',
  answers: 'Is there a difference at all?',
  reportName: 'Triangle test (in the manner of ISO 4120)',
  sampleCount: { min: 2, max: 2 },
  unit: 'set',
  glassesPerBlock: 3,
  glassesPerSample: 1.5,
  items: null,
  chance: 1 / 3,
  ballot: { kind: 'pick', picks: 1, hasReference: false, asksGuess: true },
  scale: 'Forced choice of one glass of three; a guess is said',
  orders: 'The six orders, dealt in blocks of six and drawn anew for each set (ISO 4120, clause 7.1)',
};
