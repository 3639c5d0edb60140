import Link from 'next/link';
import { ArchiveForm } from './fill-forms';

interface FillRow {
  id: string;
  lotId: string;
  lot: string;
  lotName: string;
  from: string;
  to: string | null;
  note: string;
}

export function FillTable({ cellar, fills }: { cellar: string; fills: FillRow[] }) {
  return (
    <table className="ledger folds">
      <thead><tr><th scope="col">Lot</th><th scope="col">From</th><th scope="col">To</th><th scope="col">Note</th></tr></thead>
      <tbody>
        {fills.map((fill) => (
          <tr key={fill.id}>
            <td data-label="Lot"><Link href={`/c/${cellar}/lots/${fill.lotId}`}><b>{fill.lot}</b></Link> <span className="soft">{fill.lotName}</span></td>
            <td data-label="From">{fill.from}</td>
            <td data-label="To">{fill.to ?? <span className="live">still in</span>}</td>
            <td data-label="Note" className="soft">{fill.note}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

export interface PullRow {
  id: string;
  at: string;
  by: string;
  lot: string;
  method: string;
  volumeMl: number;
  temperatureC: number | null;
  hiss: boolean | null;
  note: string;
  isArchived: boolean;
  undone: string[];
}

const HISS = { true: 'hissed', false: 'no hiss' } as const;

export function PullTable({ cellar, pulls, mayEdit }: { cellar: string; pulls: PullRow[]; mayEdit: boolean }) {
  return (
    <table className="ledger folds">
      <thead><tr><th scope="col">Drawn</th><th scope="col">Lot</th><th scope="col" className="num n">mL</th><th scope="col" className="num n">°C</th><th scope="col">How</th><th scope="col">Note</th><th scope="col">By</th>{mayEdit && <th scope="col">Put away</th>}</tr></thead>
      <tbody>
        {pulls.map((pull) => (
          <tr key={pull.id} className={pull.isArchived ? 'dim' : ''}>
            <td data-label="Drawn">{pull.at}{pull.isArchived && ' (archived)'}</td>
            <td data-label="Lot">{pull.lot}</td>
            <td data-label="mL" className="num n">{pull.volumeMl}</td>
            <td data-label="°C" className="num n">{pull.temperatureC ?? ''}</td>
            <td data-label="How" className="soft">{[pull.method.split(',')[0], pull.hiss === null ? '' : HISS[`${pull.hiss}`]].filter(Boolean).join(', ')}{pull.undone.length > 0 && <span className="warn">, {pull.undone.join(', ')}</span>}</td>
            <td data-label="Note" className="soft">{pull.note}</td>
            <td data-label="By" className="soft">{pull.by}</td>
            {mayEdit && <td><ArchiveForm cellar={cellar} kind="pull" id={pull.id} isArchived={pull.isArchived} label={`the pull of ${pull.at}`} /></td>}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
