'use client';

import type { SheetState, SheetStore } from '@/lib/offline/store';

/** How much is on this phone only, and what to do when it can't be sent. Always visible. */
export function KeptLine({ state }: { state: SheetState }) {
  if (state.isUnkept) return <>keeping…</>;
  return <>{state.waiting > 0 ? `${state.waiting} on this phone` : state.received > 0 ? 'all received' : 'nothing yet'}</>;
}

/** Trouble in words, with the way on; nothing when all is well. */
export function Trouble({ state, store, joinKey }: { state: SheetState; store: SheetStore; joinKey: string }) {
  if (state.refused.length > 0) {
    return (
      <div className="caution" role="status">
        <p><b>{state.refused.length === 1 ? 'One answer was refused' : `${state.refused.length} answers were refused`}</b> and stays on this phone. Show this to the leader.</p>
        <ul>{[...new Set(state.refused.map((row) => row.message))].map((message) => <li key={message}>{message}</li>)}</ul>
      </div>
    );
  }
  if (state.trouble === 'no-seat') {
    return <p className="caution" role="status">This phone no longer holds the seat. {state.waiting} answers stay on this phone: ask the leader for a new link to your seat, open it here, and they are sent. <a href={`/j/${joinKey}`}>Look again</a></p>;
  }
  if (state.trouble && state.waiting > 0) {
    return (
      <p className="caution row wrap" role="status">
        <span>No answer from the server. Go on: everything is kept on this phone. Keep this page open.</span>
        <button type="button" className="link" onClick={() => void store.flush()}>Send now</button>
      </p>
    );
  }
  return null;
}
