import { CALL_WORDS } from '@/lib/calls/format';
import type { CallFilter } from '@/lib/calls/schema';

const VIEWS: Record<CallFilter['show'], string> = { standing: 'Standing', all: 'All', withdrawn: 'Taken back' };

/** Search and choice of calls: a plain GET form, so that the address holds it. */
export function CallFilterForm({ filter }: { filter: CallFilter }) {
  return (
    <form className="toolbar" role="search">
      <div className="field">
        <label htmlFor="find">Find</label>
        <input className="input" id="find" name="find" type="search" defaultValue={filter.find} maxLength={80} placeholder="barrel, lot or reason" />
      </div>
      <div className="field">
        <label htmlFor="show">Which</label>
        <select className="input" id="show" name="show" defaultValue={filter.show}>
          {Object.entries(VIEWS).map(([value, label]) => <option key={value} value={value}>{label}</option>)}
        </select>
      </div>
      <div className="field">
        <label htmlFor="kind">Call</label>
        <select className="input" id="kind" name="kind" defaultValue={filter.kind ?? ''}>
          <option value="">Every kind</option>
          {Object.entries(CALL_WORDS).map(([value, label]) => <option key={value} value={value}>{label}</option>)}
        </select>
      </div>
      <input type="hidden" name="sort" value={filter.sort} />
      <button className="btn">Show</button>
    </form>
  );
}
