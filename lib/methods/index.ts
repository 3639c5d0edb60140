import type { Method } from '@/db/enums';
import { profile } from './profile';
import { triangle } from './triangle';
import type { MethodDescription } from './types';

/** The methods that a session can have. A further one is a folder and a line here. */
export const METHOD_REGISTRY: Record<Method, MethodDescription> = { profile, triangle };

export const methodOf = (method: Method): MethodDescription => METHOD_REGISTRY[method];
