let fixed: Date | null = null;

/** The present moment. The domain asks here and nowhere else, so that a demo can have a past. */
export const now = (): Date => new Date(fixed ?? Date.now());

/**
 * Runs `work` as if it were that moment. Synchronous on purpose: no other request can slip in
 * between. Only the demo's filling and tests use it.
 */
export function atMoment<T>(moment: Date, work: () => T): T {
  const before = fixed;
  fixed = moment;
  try {
    return work();
  } finally {
    fixed = before;
  }
}
