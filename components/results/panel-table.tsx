import { Ring } from '@/components/ui/ring';
import type { PanelistView, PanelView } from '@/lib/results/types';

const RINGS = { fine: 'done', 'needs a refresher': 'waits', 'not judged': 'to-come' } as const;

const figure = (value: number | null, digits: number) => (value === null ? <span className="hint">–</span> : value.toFixed(digits));

function Row({ person, lines }: { person: PanelistView; lines: number }) {
  const isWarned = person.word === 'needs a refresher';
  return (
    <tr>
      <th scope="row"><b>{person.seat}</b> {person.name && <span className="soft">{person.name}</span>}</th>
      <td><span className={`row ${isWarned ? 'warn' : 'soft'}`}><Ring state={RINGS[person.word]} size={14} />{person.word}</span></td>
      <td className="num max-md:inline-block max-md:mr-4" data-label="Repeats within, points:">{figure(person.repeatability, 1)}</td>
      <td className="num max-md:inline-block max-md:mr-4" data-label="Agrees with the rest, r:">{figure(person.agreement, 2)}</td>
      <td className="num max-md:inline-block max-md:mr-4" data-label="Tells samples apart, lines:">{person.discriminated === null ? <span className="hint">–</span> : `${person.discriminated} of ${lines}`}</td>
      <td data-label="Clearest line:" className="soft">{person.bestF ? `${person.bestF.line}, F ${person.bestF.F.toFixed(1)}` : ''}</td>
    </tr>
  );
}

/** How the panel did: a sentence, then each seat in its own order. Never a league table. */
export function PanelTable({ panel }: { panel: PanelView }) {
  return (
    <div className="stack">
      <p className="text-16"><b>{panel.headline}</b> {panel.sentences.join(' ')}</p>
      {panel.panelists.length > 0 && (
        <table className="ledger folds">
          <thead>
            <tr><th scope="col">Seat</th><th scope="col">In a word</th><th scope="col" className="num">Repeats within, points</th><th scope="col" className="num">Agrees with the rest, <i>r</i></th><th scope="col" className="num n">Tells samples apart, lines</th><th scope="col">Clearest line</th></tr>
          </thead>
          <tbody>{panel.panelists.map((person) => <Row key={person.seat} person={person} lines={panel.lines} />)}</tbody>
        </table>
      )}
      <details>
        <summary className="link">How the words come about</summary>
        <p className="soft pt-2" style={{ maxWidth: '80ch' }}>
          In the manner of ISO 11132. Repeatability: the standard deviation between repeats of a sample, over the lines. Agreement: the correlation of the seat’s means with
          the mean of the other seats, averaged over the lines on which the panel showed a difference. Discrimination: the seat’s own one-way F test on each line. A refresher is
          suggested when agreement is below 0.4, a line was used the other way round (r of −0.4 or less), no line was told apart, or repeats are more than twice as wide as
          the panel’s median. These limits are common practice, not a standard, and a dash means that it can’t be told from this session.
        </p>
      </details>
    </div>
  );
}
