import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'duo_trio',
  name: 'Duo-trio',
  answers: 'Is there a difference at all, beside a reference?',
  reportName: 'Duo-trio test, balanced reference (in the manner of ISO 10399)',
  sampleCount: { min: 2, max: 2 },
  unit: 'set',
  glassesPerBlock: 3,
  glassesPerSample: 1.5,
  items: null,
  chance: 1 / 2,
  ballot: { kind: 'pick', picks: 1, hasReference: true, asksGuess: true },
  scale: 'Forced choice of the one of two glasses that is like the reference; a guess is said',
  orders: 'The four orders with either sample as the reference, dealt in blocks of four and drawn anew for each set (ISO 10399)',
};
