import type { LineView, PanelistView, TestView } from '../results/types';
import { figuresUnder, type Figure } from './figure';

/** From this many panelists on, the p of W comes from F; below, arrangements are counted, which the script does not do. */
const PANEL_FOR_F = 8;

/** An F beyond this is over an error that is 0 but for rounding: its digits mean nothing and are not compared. */
const F_MOST = 1e12;

const testOf = (id: string, what: string, test: TestView | null): Figure[] =>
  test && test.F < F_MOST ? figuresUnder(id, what, { F: test.F, df1: test.df1, df2: test.df2, p: test.p }) : [];

/** Means without a test: of all scores, or of those who scored every glass where a table of them was there. */
function plainFigures(line: LineView): Figure[] {
  const of = line.assessors >= 2 ? 'complete' : 'plain';
  return line.cells.flatMap((cell) => figuresUnder(`line.${line.item}.${of}.mean`, `${line.name}, mean of sample`, { [cell.sample]: cell.mean }));
}

function testedFigures(line: LineView, family: 'anova' | 'mixed'): Figure[] {
  const id = `line.${line.item}.${family}`;
  return [
    ...testOf(`${id}.product`, `${line.name}, samples`, line.product),
    ...testOf(`${id}.interaction`, `${line.name}, panelist × sample`, line.interaction),
    ...testOf(`${id}.assessor`, `${line.name}, panelists`, line.assessor),
    ...testOf(`${id}.scaling`, `${line.name}, use of the scale`, line.scaling),
    ...figuresUnder(id, line.name, { smallest_difference: line.smallestDifference }),
    ...line.cells.flatMap((cell) => figuresUnder(`${id}.sample.${cell.sample}`, `${line.name}, sample ${cell.sample}`, { mean: cell.mean, n: cell.n, low: cell.low, high: cell.high })),
    ...line.pairs.flatMap(({ a, b, difference, low, high, p }) => figuresUnder(`${id}.pair.${a}.${b}`, `${line.name}, sample ${b} less sample ${a}`, { difference, low, high, p })),
  ];
}

/**
 * The figures of one line. Ids of the analysis of variance hold `anova`, those of the mixed model for
 * lines with gaps `mixed`; agreement is that of the panelists who scored every glass.
 */
export function lineFigures(line: LineView): Figure[] {
  const id = `line.${line.item}`;
  const complete = line.assessors - line.gaps.length;
  return [
    ...(line.method === 'none' ? plainFigures(line) : testedFigures(line, line.method)),
    ...testOf(`${id}.position`, `${line.name}, place in the flight`, line.position),
    ...(line.position ? figuresUnder(`${id}.position`, `${line.name}, place in the flight`, { span: line.position.span }) : []),
    ...figuresUnder(id, line.name, { at_ends: line.cells.length > 0 ? line.atEnds : null, kendall_w: line.kendallW, kendall_p: complete >= PANEL_FOR_F ? line.kendallP : null }),
    ...(line.icc ? figuresUnder(`${id}.icc`, `${line.name}, agreement of the panel’s mean`, { value: line.icc.value, low: line.icc.low, high: line.icc.high }) : []),
  ];
}

/** The figures of one panelist over the lines. */
export const panelistFigures = ({ seat, agreement, discriminated, bestF, repeatability }: PanelistView): Figure[] =>
  figuresUnder(`seat.${seat}`, `Seat ${seat}`, { agreement, discriminated, best_F: bestF?.F, best_p: bestF?.p, repeatability });
