'use client';

import { useState, type FormEvent } from 'react';
import { Scanner } from '@/components/scan/camera';
import { Ring } from '@/components/ui/ring';
import { collect, type Collected } from '@/lib/handover/frames';
import type { HandoverResult } from '@/lib/handover/receive';
import type { ErrorBody } from '@/lib/http/handler';

interface Sent {
  which: string;
  result: HandoverResult | null;
  refusal: string | null;
}

const CAMERA_WORDS = {
  start: 'Start the camera',
  stop: 'Stop the camera',
  picture: 'Take a picture of a code',
  none: 'No code was read. On plain http a browser gives no camera: take a picture of each code instead, close and straight.',
};

/** The leader's side of a handover: scans a phone's codes, sends the whole, says what was received. */
export function HandoverScan({ url }: { url: string }) {
  const [seen, setSeen] = useState<ReadonlyMap<string, Collected>>(new Map());
  const [sent, setSent] = useState<Sent[]>([]);
  const [typed, setTyped] = useState('');

  const send = async (which: string, text: string) => {
    setSent((list) => [...list.filter((entry) => entry.which !== which), { which, result: null, refusal: null }]);
    const finish = (rest: Omit<Sent, 'which'>) => setSent((list) => list.map((entry) => (entry.which === which ? { which, ...rest } : entry)));
    try {
      const response = await fetch(url, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify({ text }) });
      if (response.ok) finish({ result: (await response.json()) as HandoverResult, refusal: null });
      else finish({ result: null, refusal: ((await response.json()) as ErrorBody).error.message });
    } catch {
      finish({ result: null, refusal: 'This device has lost the server. Scan again when it is back: nothing counts twice.' });
    }
  };
  const onCodes = (codes: readonly string[]) => {
    const next = codes.reduce(collect, seen);
    if (next === seen) return;
    setSeen(next);
    for (const [which, { text }] of next) {
      const isKnown = sent.some((entry) => entry.which === which && entry.refusal === null);
      if (text && !isKnown) void send(which, text);
    }
  };
  const onType = (event: FormEvent) => {
    event.preventDefault();
    onCodes(typed.split(/\s+/).filter(Boolean));
    setTyped('');
  };
  const open = [...seen].filter(([, { text }]) => text === null);
  return (
    <div className="stack">
      <Scanner onCode={(code) => onCodes([code])} words={CAMERA_WORDS} />
      {open.map(([which, { parts, total }]) => <p key={which} className="row" role="status"><Ring state="open" /> {parts.size} of {total} codes read; hold on until all have had their turn</p>)}
      <ul className="stack tight" aria-live="polite">
        {sent.map(({ which, result, refusal }) => (
          <li key={which} className="row">
            <Ring state={result ? 'done' : refusal ? 'waits' : 'open'} />
            {result && <span><b>Seat {result.seat}</b>: {result.received} received{result.late > 0 && `, ${result.late} after close: set aside`}{result.refused.length > 0 && `, ${result.refused.length} refused`}</span>}
            {refusal && <span>{refusal}</span>}
            {!result && !refusal && <span>Sending…</span>}
          </li>
        ))}
      </ul>
      <details>
        <summary className="link">Paste a code’s text</summary>
        <form onSubmit={onType} className="stack tight pt-2">
          <label htmlFor="code-text">Text of one code or of several</label>
          <textarea id="code-text" className="input" rows={3} value={typed} onChange={(event) => setTyped(event.target.value)} spellCheck={false} />
          <button className="btn">Take it</button>
        </form>
      </details>
    </div>
  );
}
