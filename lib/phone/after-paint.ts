/** How long work may wait for a paint: a phone that is put away paints nothing. */
const LONGEST_MS = 80;

/** Runs work right after the next paint, so that a finger sees its answer first; without a paint soon anyway. */
export function afterPaint(work: () => void): void {
  let isDone = false;
  const run = () => {
    if (isDone) return;
    isDone = true;
    work();
  };
  requestAnimationFrame(() => setTimeout(run));
  setTimeout(run, LONGEST_MS);
}
