'use client';

import { useEffect, useState } from 'react';
import encodeQR from 'qr';
import { useWords } from '@/components/i18n/words';
import type { Sheet } from '@/lib/ballots/types';
import { toFrames } from '@/lib/handover/frames';
import { packHandover } from '@/lib/handover/pack';
import type { SheetState, SheetStore } from '@/lib/offline/store';

/** How long each code is shown before the next takes its turn. */
const TURN_MS = 2_000;

interface Props {
  sheet: Sheet;
  store: SheetStore;
  state: SheetState;
  onBack(): void;
}

/** A QR code in black on white whatever the mode: cameras want it so. */
function CodePicture({ text, label }: { text: string; label: string }) {
  const svg = encodeQR(text, 'svg', { ecc: 'low', border: 3 });
  // A picture made on this phone: there is nothing to optimise or to load.
  // eslint-disable-next-line @next/next/no-img-element
  return <img src={`data:image/svg+xml;utf8,${encodeURIComponent(svg)}`} alt={label} width={340} height={340} className="handover-code" />;
}

/** The last resort without signal: what waits here as QR codes that take turns, for the leader's device. */
export function HandoverSheet({ sheet, store, state, onBack }: Props) {
  const t = useWords();
  const [frames, setFrames] = useState<string[]>([]);
  const [at, setAt] = useState(0);
  const [isTurning, setTurning] = useState(true);
  const owed = state.waiting + state.sent;
  useEffect(() => {
    let isGone = false;
    const ops = store.owed();
    if (ops.length === 0) return;
    void packHandover({ joinKey: sheet.joinKey, ops }, sheet.handoverKey).then((text) => {
      // Which handover it is: the tail of its mark, so that the same answers give the same codes.
      if (!isGone) setFrames(toFrames(text, text.slice(-6)));
    });
    return () => {
      isGone = true;
    };
  }, [store, sheet, owed]);
  useEffect(() => {
    if (!isTurning || frames.length < 2) return;
    const turn = setInterval(() => setAt((n) => n + 1), TURN_MS);
    return () => clearInterval(turn);
  }, [isTurning, frames.length]);
  const shown = frames.length > 0 ? at % frames.length : 0;
  const step = (by: number) => {
    setTurning(false);
    setAt((shown + by + frames.length) % frames.length);
  };
  return (
    <>
      <div className="bench"><h1>{t('handover.title')}</h1></div>
      <div className="phone-body">
        {owed === 0 || frames.length === 0 ? (
          <p role="status">{owed === 0 ? t('handover.nothing') : '…'}</p>
        ) : (
          <>
            <p>{t('handover.words')}</p>
            <CodePicture text={frames[shown]!} label={t('handover.codeOf', { n: shown + 1, total: frames.length })} />
            <p className="soft" style={{ textAlign: 'center' }}>{t('handover.codeOf', { n: shown + 1, total: frames.length })}. {t('handover.holds', { n: owed, seat: sheet.seatLabel })}</p>
            {frames.length > 1 && (
              <div className="row" style={{ justifyContent: 'center' }}>
                <button type="button" className="btn" onClick={() => step(-1)}>{t('handover.previous')}</button>
                <button type="button" className="btn" onClick={() => step(1)}>{t('handover.next')}</button>
              </div>
            )}
            <p className="soft">{t('handover.stays')}</p>
          </>
        )}
      </div>
      <footer className="foot-bar"><button type="button" className="btn btn-main wide" onClick={onBack}>{t('handover.back')}</button></footer>
    </>
  );
}
