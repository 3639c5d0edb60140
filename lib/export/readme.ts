import type { ResultsView } from '../results/types';

/** What the bundle holds and how it is used, as plain text of the session. */
export function readmeOf({ session }: Pick<ResultsView, 'session'>): string {
  return `${session.title}
Unsealed ${session.unsealedOn}

Here are the answers of this tasting, the figures of its results, and a script that
computes the figures anew from the answers. It shares no code with the program that
made the results.

To run it: install R (r-project.org), then, in this folder,

    Rscript reproduce.R

It prints each figure, as the program gave it and as R gives it, and the difference.
It ends with status 1 if any differs by more than one part in a million, or could not
be computed. For lines with gaps the packages lme4, lmerTest and pbkrtest are needed;
without them those figures are named as skipped.

data/answers.csv   one row for each answer that counts. Late answers, and values that
                   the panelist replaced or took back before close, are not in it.
  seat             number of the seat; no names
  block            flight or set, from 1
  position         place of the glass in the block; of a choice: the chosen glass
  position_2       the other glass where two were chosen
  code             three digits on the glass
  sample           number of the sample, and sample_label its name
  item             line of the ballot, with item_name and phase
  kind             score, fault, choice, order or comment
  value            the score; 1 for a fault that was noted
  guess            yes or no, for choices
  text             the comment; of an order, places from least to most
data/glasses.csv   every glass that stood before a taken seat, answered or not
data/seats.csv     the seats that were taken
data/design.csv    what was fixed before the tasting
figures.csv        the figures: id, what, value (all digits that the program has)
reproduce.R, R/    the script

The files are UTF-8. Words that a spreadsheet would take for a formula have an
apostrophe before them.

Not computed anew: letters beside means (they follow from the p of the pairs), p values
that the program gets by counting arrangements (Kendall's W below 8 panelists, orders
below 13 people, words that were ticked), p of liking that was lost, and an F over an
error that is 0 but for rounding. What may lie near 0 (Tukey's p and limits, differences)
is compared to eight decimals, or for lines with gaps to six of a point.
`;
}
