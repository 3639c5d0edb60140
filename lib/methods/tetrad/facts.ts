import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'tetrad',
  name: 'Tetrad',
  answers: 'Is there a difference at all, with fewer people?',
  reportName: 'Tetrad test, unspecified',
  sampleCount: { min: 2, max: 2 },
  unit: 'set',
  glassesPerBlock: 4,
  glassesPerSample: 2,
  items: null,
  chance: 1 / 3,
  ballot: { kind: 'pick', picks: 2, hasReference: false, asksGuess: true },
  scale: 'Four glasses sorted into two pairs; a guess is said',
  orders: 'The six orders of two and two, dealt in blocks of six and drawn anew for each set',
};
