import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'duo_trio_constant',
  name: 'Duo-trio, constant reference',
  answers: 'Does it differ from the one that we know?',
  reportName: 'Duo-trio test, constant reference (in the manner of ISO 10399)',
  sampleCount: { min: 2, max: 2 },
  unit: 'set',
  glassesPerBlock: 3,
  glassesPerSample: 2,
  items: null,
  chance: 1 / 2,
  ballot: { kind: 'pick', picks: 1, hasReference: true, asksGuess: true },
  scale: 'Forced choice of the one of two glasses that is like the reference; a guess is said',
  orders: 'The control, or else the first sample, is the reference for all; the two orders behind it are dealt in pairs and drawn anew for each set (ISO 10399)',
};
