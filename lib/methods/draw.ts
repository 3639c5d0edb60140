import 'server-only';
import { randomInt } from 'node:crypto';
import type { Draw } from './types';

/** The system's cryptographic random source. */
export const systemDraw: Draw = (n) => (n <= 1 ? 0 : randomInt(n));
