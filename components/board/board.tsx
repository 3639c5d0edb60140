'use client';

import useSWR from 'swr';
import { Ring } from '@/components/ui/ring';
import type { Method } from '@/db/enums';
import type { Board as BoardData, BoardSeat } from '@/lib/board/types';
import { factsOf } from '@/lib/methods/facts';
import { UNIT_WORDS } from '@/lib/methods/types';
import { EraseName } from './erase-name';
import { SeatLink } from './seat-link';

const EVERY_MS = 2000;
/** After so long without a word a phone counts as silent. */
const SILENT_S = 120;

async function fetchBoard(url: string): Promise<BoardData> {
  const response = await fetch(url, { cache: 'no-store' });
  if (!response.ok) throw new Error(String(response.status));
  return response.json();
}

const ago = (seconds: number | null): string => (seconds === null ? '' : seconds < 90 ? `${seconds} s` : `${Math.round(seconds / 60)} min`);

function whereOf(seat: BoardSeat, method: Method, units: number): { text: string; waits: boolean } {
  const { unit } = factsOf(method);
  const { one, many } = UNIT_WORDS[unit];
  if (!seat.isClaimed) return { text: 'nobody has joined', waits: !seat.isReserve };
  if (seat.hasLeft) return { text: 'has left', waits: false };
  if (seat.isSubmitted) return { text: `handed in, ${seat.received} of ${units} ${many}`, waits: false };
  if (seat.silentS !== null && seat.silentS > SILENT_S) return { text: 'phone silent', waits: true };
  if (!seat.at) return { text: 'has joined', waits: false };
  return { text: unit === 'set' ? `${one} ${seat.at.block}` : `${one} ${seat.at.position}${seat.at.phase ? `, ${seat.at.phase}` : ''}`, waits: false };
}

interface Props {
  url: string;
  method: Method;
  initial: BoardData;
  cellar: string;
  sessionId: string;
}

/** Who is where, live. Counts only. */
export function Board({ url, method, initial, cellar, sessionId }: Props) {
  const { data, error } = useSWR(url, fetchBoard, { refreshInterval: (latest) => ((latest ?? initial).state === 'unsealed' ? 0 : EVERY_MS), fallbackData: initial, dedupingInterval: 500 });
  const board = data ?? initial;
  const isOpen = board.state === 'open';
  const { many } = UNIT_WORDS[factsOf(method).unit];
  const shown = board.seats.filter((seat) => seat.isClaimed || !seat.isReserve);
  const freeReserves = board.seats.length - shown.length;
  const received = shown.reduce((sum, seat) => sum + seat.received, 0);
  const expected = shown.length * board.unitsPerSeat;
  const onPhones = shown.reduce((sum, seat) => sum + seat.onPhone, 0);
  const waiting = shown.filter((seat) => isOpen && seat.isClaimed && whereOf(seat, method, board.unitsPerSeat).waits);
  const free = shown.filter((seat) => isOpen && !seat.isClaimed).map((seat) => seat.label);
  return (
    <div className="stack">
      {error && <p className="caution" role="status">The board has lost the server; these figures may be old. Answers are safe on the phones.</p>}
      <div className="tally row"><b>{received}</b><span className="soft">of {expected} {many} received<br />{onPhones} answers on phones</span></div>
      <div className="progress" role="progressbar" aria-label={`${many} received`} aria-valuemin={0} aria-valuemax={expected} aria-valuenow={received}><span style={{ width: `${expected ? (100 * received) / expected : 0}%` }} /></div>
      {waiting.length + free.length > 0 && (
        <ul className="waits" aria-label="Who waits?">
          {free.length > 0 && <li><Ring state="waits" size={16} /><span><b>{free.length === 1 ? 'Seat' : 'Seats'} {free.join(', ')}</b>: nobody has joined</span></li>}
          {waiting.map((seat) => (
            <li key={seat.number}><Ring state="waits" size={16} /><span><b>Seat {seat.label}</b> {whereOf(seat, method, board.unitsPerSeat).text}, {ago(seat.silentS)}</span></li>
          ))}
        </ul>
      )}
      <table className="ledger folds tight">
        <thead><tr><th className="num n">Seat</th><th>Name</th><th>Where</th><th>{many}</th><th className="num">Received</th><th className="num">On phone</th><th className="num">Last heard</th><th>{isOpen ? 'Phone lost?' : 'Asked for?'}</th></tr></thead>
        <tbody>
          {shown.map((seat) => {
            const where = whereOf(seat, method, board.unitsPerSeat);
            return (
              <tr key={seat.number}>
                <td className="num n" data-label="Seat"><b>{seat.label}</b></td>
                <td data-label="Name">{seat.name || (seat.isClaimed ? <span className="hint">erased</span> : <span className="hint">free</span>)}</td>
                <td data-label="Where" className={where.waits ? 'warn' : seat.isSubmitted ? 'soft' : ''}>{where.text}</td>
                <td data-label={many}><Rings seat={seat} units={board.unitsPerSeat} /></td>
                <td className="num" data-label="Received">{seat.isClaimed ? seat.received : '–'}</td>
                <td className="num" data-label="On phone">{seat.onPhone || ''}</td>
                <td className="num soft" data-label="Last heard">{ago(seat.silentS)}</td>
                <td>
                  {seat.isClaimed && isOpen && <SeatLink cellar={cellar} sessionId={sessionId} seat={seat.number} label={seat.label} />}
                  {seat.name !== '' && !isOpen && <EraseName cellar={cellar} sessionId={sessionId} seat={seat.number} label={seat.label} />}
                </td>
              </tr>
            );
          })}
          {freeReserves > 0 && <tr><td className="num n">R</td><td className="hint" colSpan={7}>{freeReserves} reserve {freeReserves === 1 ? 'seat' : 'seats'}, sealed in the same plan</td></tr>}
        </tbody>
      </table>
    </div>
  );
}

function Rings({ seat, units }: { seat: BoardSeat; units: number }) {
  if (units > 12) return <span>{seat.received} of {units}</span>;
  return (
    <span className="dots" role="img" aria-label={`${seat.received} of ${units}`}>
      {Array.from({ length: units }, (_, i) => <Ring key={i} size={13} state={i < seat.received ? 'done' : i === seat.received && seat.isClaimed && !seat.isSubmitted ? 'open' : 'to-come'} />)}
    </span>
  );
}
