import { generalizedProcrustes, multipleFactorAnalysis } from '@/stats';
import { tablesByAssessor } from './cross-tables';
import { caseRows } from './tables';
import type { Answerer, CaseInput, Table } from './types';

/** Axes that the reference prints in full. */
const AXES = 3;

/** The groups of a case: columns of the file in order, or one table of means per assessor. */
function groupTables(c: CaseInput, load: (csv: string) => Table): number[][][] {
  const table = caseRows(c, load);
  const sizes = c.inputs.groups as readonly number[];
  const range = /columns (\d+) to (\d+)/.exec(String(c.inputs.how));
  const long = (c.inputs.group_names as string[]).every((name) => table.rows.some((row) => Object.values(row).some((cell) => String(cell) === String(name))));
  if (!range && long) return tablesByAssessor(table, c.inputs.group_names as string[], c.inputs.row_labels as string[], sizes[0]);
  let from = range ? Number(range[1]) - 1 : table.columns.length - sizes.reduce((sum, size) => sum + size, 0);
  return sizes.map((size) => {
    const columns = table.columns.slice(from, from + size);
    from += size;
    return table.rows.map((row) => columns.map((column) => Number(row[column])));
  });
}

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('14') && 'group_types' in c.inputs,
    answer(c, load) {
      const types = c.inputs.group_types as readonly string[];
      const result = multipleFactorAnalysis(
        groupTables(c, load).map((table, i) => ({ table, scale: types[i] === 's' })),
        AXES,
      );
      return {
        eigenvalues: result.eigenvalues,
        percent: result.percent,
        separate_first_eigenvalues: result.separateFirstEigenvalues,
        individual_coordinates: result.coordinates,
        group_coordinates: result.groupCoordinates,
        RV_between_groups: result.rv,
      };
    },
  },
  {
    matches: (c) => c.file.startsWith('14') && 'set_names' in c.inputs,
    answer(c, load) {
      const width = Number(/x (\d+) attributes/.exec(String(c.inputs.how))?.[1]);
      const sets = tablesByAssessor(caseRows(c, load), c.inputs.set_names as string[], c.inputs.row_labels as string[], width);
      const scaled = generalizedProcrustes(sets, { starts: 60 });
      const rigid = generalizedProcrustes(sets, { scale: false, starts: 60 });
      return {
        with_scaling: {
          total_SS: scaled.totalSs,
          consensus_SS: scaled.consensusSs,
          residual_SS: scaled.residualSs,
          consensus_percent: scaled.consensusPercent,
          scaling_factors: scaled.scalingFactors,
          residual_by_set: scaled.residualBySet,
          residual_by_object: scaled.residualByObject,
          consensus_by_object: scaled.consensusByObject,
          consensus_principal_axes_percent: scaled.consensusAxesPercent,
        },
        without_scaling: {
          consensus_percent: rigid.consensusPercent,
          residual_SS: rigid.residualSs,
          residual_by_set: rigid.residualBySet,
        },
      };
    },
  },
];
