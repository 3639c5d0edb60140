import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'preference',
  name: 'Paired preference',
  answers: 'Which of the two do they like better?',
  reportName: 'Paired preference (in the manner of ISO 5495)',
  sampleCount: { min: 2, max: 2 },
  unit: 'set',
  glassesPerBlock: 2,
  glassesPerSample: 1,
  items: null,
  chance: null,
  ballot: { kind: 'pick', picks: 1, hasReference: false, asksGuess: false },
  scale: 'Forced choice of one glass of two',
  orders: 'Both orders, dealt in pairs and drawn anew for each set (ISO 5495)',
};
