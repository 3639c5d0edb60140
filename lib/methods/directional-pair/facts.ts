import type { MethodFacts } from '../types';

export const facts: MethodFacts = {
  method: 'directional_pair',
  name: 'Directional pair',
  answers: 'Which of the two has more of it?',
  reportName: 'Paired comparison, directional (in the manner of ISO 5495)',
  sampleCount: { min: 2, max: 2 },
  unit: 'set',
  glassesPerBlock: 2,
  glassesPerSample: 1,
  items: { kind: 'ask', from: 'chosen', min: 1, max: 1, label: 'Which has more of what?', hint: 'One trait.', hasFlags: false, asksLiking: false },
  chance: null,
  ballot: { kind: 'pick', picks: 1, hasReference: false, asksGuess: true },
  scale: 'Forced choice of one glass of two; a guess is said',
  orders: 'Both orders, dealt in pairs and drawn anew for each set (ISO 5495)',
};
