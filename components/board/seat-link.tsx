'use client';

import { useActionState } from 'react';
import { reissueAction } from '@/lib/sessions/reissue-action';

/** A one-time link that moves a seat to another phone. Shown once. */
export function SeatLink({ cellar, sessionId, seat, label }: { cellar: string; sessionId: string; seat: number; label: string }) {
  const [result, dispatch, isPending] = useActionState(reissueAction, null);
  if (result?.url) {
    return (
      <div className="stack tight" role="status">
        {/* A data: picture made here; the image optimiser has nothing to do with it. */}
        {/* eslint-disable-next-line @next/next/no-img-element */}
        <img className="qr" src={result.qr ?? ''} alt={`QR code that moves seat ${label} to another phone`} width={148} height={148} />
        <span className="note" style={{ overflowWrap: 'anywhere' }}>{result.url}<br />Works once, for four hours.</span>
      </div>
    );
  }
  return (
    <form action={dispatch}>
      <input type="hidden" name="cellar" value={cellar} />
      <input type="hidden" name="sessionId" value={sessionId} />
      <input type="hidden" name="seat" value={seat} />
      <button className="link" disabled={isPending} aria-label={`New link for seat ${label}`}>New link</button>
      {result?.error && <p className="error">{result.error}</p>}
    </form>
  );
}
