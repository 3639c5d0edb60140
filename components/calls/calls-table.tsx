import Link from 'next/link';
import { Ring } from '@/components/ui/ring';
import { CALL_WORDS, STATUS_WORDS } from '@/lib/calls/format';
import type { CallView } from '@/lib/calls/types';
import { showCalendarDay } from '@/lib/time';

/** Where a call stands, as ring and word. */
export function CallStatus({ call }: { call: CallView }) {
  if (call.isDue) return <span className="row warn"><Ring state="waits" />due</span>;
  if (call.status === 'standing') return <span className="row"><Ring state="to-come" />{STATUS_WORDS.standing}</span>;
  return <span className="row soft"><Ring state="done" />{STATUS_WORDS[call.status]}</span>;
}

/** Calls as a ledger. `hrefOf` makes the link of a column's head, when the list can be sorted. */
export function CallsTable({ cellar, calls, sort, hrefOf }: { cellar: string; calls: CallView[]; sort?: string; hrefOf?: (sort: string) => string }) {
  const head = (key: string, label: string) =>
    hrefOf ? <Link href={hrefOf(key)} aria-current={sort === key ? 'true' : undefined}>{label}</Link> : label;
  return (
    <table className="ledger folds">
      <thead>
        <tr><th scope="col" className="whitespace-nowrap">{head('next', 'Next date')}</th><th scope="col">{head('barrel', 'Barrel')}</th><th scope="col">Call</th><th scope="col">Reasons</th><th scope="col">{head('decided', 'Decided')}</th><th scope="col">Where it stands</th></tr>
      </thead>
      <tbody>
        {calls.map((call) => (
          <tr key={call.id}>
            <td data-label="Next date" className="whitespace-nowrap">{call.nextDay ? showCalendarDay(call.nextDay) : <span className="hint">none</span>}</td>
            <td data-label="Barrel" className="whitespace-nowrap"><Link href={`/c/${cellar}/barrels/${call.vessel.id}`}><b>{call.vessel.name}</b></Link> <span className="soft">{call.lot.code}</span></td>
            <td data-label="Call"><Link className="mid" href={`/c/${cellar}/calls/${call.id}`}>{CALL_WORDS[call.kind]}</Link></td>
            <td data-label="Reasons">{call.reasons.length > 120 ? `${call.reasons.slice(0, 118)}…` : call.reasons}</td>
            <td data-label="Decided" className="soft">{call.decidedOn}, {call.decidedBy}</td>
            <td><CallStatus call={call} /></td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
