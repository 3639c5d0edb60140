import { VESSEL_WORDS } from '../register/format';
import { DRAW_WORDS } from '../results/format';
import type { ResultsView } from '../results/types';
import type { Table } from './table';

/** The samples, a row for each barrel that is in one. */
export function samplesTable({ samples }: Pick<ResultsView, 'samples'>): Table {
  return {
    columns: ['sample', 'label', 'control', 'codes', 'share', 'vessel', 'vessel_kind', 'cooper', 'year', 'lot', 'lot_name', 'pulled_on', 'pulled_how'],
    rows: samples.flatMap((sample) => {
      const own = [sample.sample, sample.label, sample.isControl ? 'yes' : 'no', sample.codes.join(' ')];
      if (sample.components.length === 0) return [[...own, null, null, null, null, null, null, null, null, null]];
      return sample.components.map((part) => [
        ...own, part.share, part.vessel, VESSEL_WORDS[part.vesselKind], part.cooper, part.year, part.lot, part.lotName, part.pulledOn, DRAW_WORDS[part.drawMethod],
      ]);
    }),
  };
}

/** The seats that were taken. Names are left out unless asked for. */
export function seatsTable({ seats }: Pick<ResultsView, 'seats'>, { withNames = false } = {}): Table {
  return {
    columns: ['seat', ...(withNames ? ['name'] : []), 'role', 'handed_in', 'left', 'answers', 'late'],
    rows: seats.map((seat) => [
      seat.number, ...(withNames ? [seat.name] : []), seat.role === 'nose_only' ? 'smells only' : 'tastes', seat.isSubmitted ? 'yes' : 'no', seat.hasLeft ? 'yes' : 'no', seat.answers, seat.late,
    ]),
  };
}

/** How the session was run, as on the page. */
export const reportTable = ({ report }: Pick<ResultsView, 'report'>): Table => ({ columns: ['item', 'text'], rows: report.map((item) => [item.name, item.text]) });
