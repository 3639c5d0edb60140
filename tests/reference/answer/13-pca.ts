import { pca } from '@/stats';
import { crossTable, values } from './cross-tables';
import { caseRows } from './tables';
import type { Answerer } from './types';

/** Axes that the reference prints in full. */
const AXES = 4;

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('13') && 'scale_to_unit_variance' in c.inputs,
    answer(c, load) {
      const table = caseRows(c, load);
      const variables = c.inputs.variables as readonly string[];
      const by = /mean of all scores per (\S+)/.exec(String(c.inputs.rows))?.[1];
      let rows: number[][];
      if (by) {
        const objects = values(table, by);
        // Grouping by the object alone: means over whatever else the file crosses.
        const means = variables.map((value) => crossTable(table, { rows: by, columns: by, value, mean: true }, objects, objects));
        rows = objects.map((_, i) => means.map((matrix) => Number(matrix[i][i])));
      } else rows = table.rows.map((row) => variables.map((variable) => Number(row[variable])));
      const n = rows.length;
      const result = pca(rows, { scale: c.inputs.scale_to_unit_variance as boolean, axes: AXES });
      return {
        centre: result.centre,
        sd_n_minus_1: result.sd,
        eigenvalues_n_minus_1: result.eigenvalues,
        eigenvalues_n: result.eigenvalues.map((value) => (value * (n - 1)) / n),
        explained_percent: result.percent,
        cumulative_percent: result.cumulativePercent,
        eigenvectors: result.eigenvectors,
        scores: result.scores,
        loadings_correlations_with_variables: result.correlations,
        cos2_individuals: result.cos2,
        contributions_individuals_percent: result.contributions,
      };
    },
  },
];
