import type { SeatSets } from '@/lib/results/types';

interface Props {
  sets: number;
  seats: readonly { seat: number; name: string | null }[];
  /** What the seat answered in that set. */
  said(seat: number, set: number): { text: string; isMissing: boolean };
}

/** Every seat's sets in the order of seats. */
export function SetsBySeat({ sets, seats, said }: Props) {
  return (
    <div className="stack" style={{ maxWidth: 640 }}>
      <p className="text-16">The answer rests on the count. {sets === 1 ? 'One set' : 'So few sets'} can’t say of one person whether he or she tastes the difference.</p>
      <table className="ledger folds">
        <thead><tr><th scope="col">Seat</th>{Array.from({ length: sets }, (_, i) => <th scope="col" key={i}>Set {i + 1}</th>)}</tr></thead>
        <tbody>
          {seats.map(({ seat, name }) => (
            <tr key={seat}>
              <th scope="row"><b>{seat}</b> {name && <span className="soft">{name}</span>}</th>
              {Array.from({ length: sets }, (_, i) => {
                const { text, isMissing } = said(seat, i + 1);
                return <td key={i} data-label={`Set ${i + 1}:`} className={isMissing ? 'hint' : ''}>{text}</td>;
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** Right or not, set by set. */
export function ChoiceSeats({ sets, bySeat }: { sets: number; bySeat: SeatSets[] }) {
  return (
    <SetsBySeat
      sets={sets} seats={bySeat}
      said={(seat, set) => {
        const answer = bySeat.find((entry) => entry.seat === seat)?.sets.find((entry) => entry.set === set);
        if (!answer || answer.isCorrect === null) return { text: 'no answer', isMissing: true };
        return { text: `${answer.isCorrect ? 'right' : 'not right'}${answer.isGuess ? ', guessed' : ''}`, isMissing: false };
      }}
    />
  );
}
