# Computes the figures of the results anew from data/answers.csv and compares them with figures.csv.
# Run with: Rscript reproduce.R
# Base R; lines with gaps need lme4, lmerTest and pbkrtest, and are skipped without them.

script <- sub("^--file=", "", grep("^--file=", commandArgs(FALSE), value = TRUE))
folder <- if (length(script) == 1) dirname(script) else "."
for (part in list.files(file.path(folder, "R"), pattern = "\\.R$", full.names = TRUE)) source(part)

figures <- read_table(file.path(folder, "figures.csv"))
design <- read_design(file.path(folder, "data", "design.csv"))
answers <- read_table(file.path(folder, "data", "answers.csv"))
glasses <- read_table(file.path(folder, "data", "glasses.csv"))
seats <- read_table(file.path(folder, "data", "seats.csv"))
scores <- read_scores(answers, glasses, seats, design)

count_figures(answers, glasses, seats)
line_figures(scores, design)
panelist_figures(scores, design)
choice_figures(answers, glasses, design)
pair_figures(answers, glasses, design)
order_figures(answers, glasses, design)
right_figures(answers)

if (!compare_figures(figures)) quit(status = 1)
