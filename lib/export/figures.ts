import type { ResultsView } from '../results/types';
import type { Figure } from './figure';
import { choiceFigures, pairFigures } from './figures-choice';
import { countFigures, orderFigures, rightFigures, tickFigures } from './figures-counts';
import { lineFigures, panelistFigures } from './figures-profile';
import type { Table } from './table';

/** The numbers of the results that the script computes anew, at full double precision. */
export function figuresOf(results: ResultsView, flagItems: readonly number[]): Figure[] {
  const { profile, choice, pair, order, ticks, right } = results;
  return [
    ...countFigures(results, flagItems),
    ...(profile ? [...profile.lines.flatMap(lineFigures), ...profile.panel.panelists.flatMap(panelistFigures)] : []),
    ...(choice ? choiceFigures(choice) : []),
    ...(pair ? pairFigures(pair) : []),
    ...(order ? orderFigures(order) : []),
    ...(ticks ? [...tickFigures(ticks), ...(ticks.liking ? lineFigures(ticks.liking) : [])] : []),
    ...(right ? [...rightFigures(right), ...(right.liking ? lineFigures(right.liking) : [])] : []),
  ];
}

/** A double's shortest text that reads back as the same double. */
export const figuresTable = (figures: readonly Figure[]): Table => ({ columns: ['id', 'what', 'value'], rows: figures.map(({ id, what, value }) => [id, what, value]) });
