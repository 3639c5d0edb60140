import type { SheetStore } from './store';

const FIRST_WAIT_MS = 1_000;
const LONGEST_WAIT_MS = 60_000;
/** With nothing to send the phone still asks now and then whether the session was closed. */
const HEARTBEAT_MS = 15_000;

/** The wait before the next try: doubling, at most a minute, with jitter so that a room doesn't retry in step. */
export const backoff = (failures: number, random: () => number): number =>
  Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 2 ** Math.min(failures, 6)) * (0.5 + random() / 2);

/**
 * Keeps sending: at once when something was kept, on `online`, on coming back to the page, and on a
 * timer. `navigator.onLine` is not believed. @returns a function that stops it
 */
export function startPump(store: SheetStore): () => void {
  let timer: ReturnType<typeof setTimeout> | undefined;
  let failures = 0;
  let isStopped = false;
  const owedNow = () => store.getState().waiting + store.getState().sent;
  let seen = owedNow();

  const run = async () => {
    clearTimeout(timer);
    const isDone = await withLock(() => store.flush());
    if (isStopped) return;
    failures = isDone ? 0 : failures + 1;
    clearTimeout(timer);
    timer = setTimeout(run, isDone ? HEARTBEAT_MS : backoff(failures, () => crypto.getRandomValues(new Uint32Array(1))[0]! / 2 ** 32));
  };
  const now = () => {
    failures = 0;
    void run();
  };
  const onChange = () => {
    const { isUnkept } = store.getState();
    const owed = owedNow();
    if (owed > seen && !isUnkept) void run();
    if (!isUnkept) seen = owed;
  };
  const onVisible = () => document.visibilityState === 'visible' && now();

  const unsubscribe = store.subscribe(onChange);
  addEventListener('online', now);
  addEventListener('pageshow', now);
  document.addEventListener('visibilitychange', onVisible);
  now();
  return () => {
    isStopped = true;
    clearTimeout(timer);
    unsubscribe();
    removeEventListener('online', now);
    removeEventListener('pageshow', now);
    document.removeEventListener('visibilitychange', onVisible);
  };
}

/** Two tabs take turns where the browser can arrange it; elsewhere the server's ids keep order. */
async function withLock(work: () => Promise<boolean>): Promise<boolean> {
  if (!('locks' in navigator) || !navigator.locks) return work();
  return navigator.locks.request('tercet-outbox', work);
}
