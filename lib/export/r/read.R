# Reading the tables of the bundle.

# UTF-8 with a byte-order mark, read without converting, so that any locale will do.
read_table <- function(path) {
  table <- read.csv(path, encoding = "UTF-8", check.names = FALSE, stringsAsFactors = FALSE, na.strings = "")
  names(table)[1] <- gsub("[^A-Za-z0-9_]", "", names(table)[1], useBytes = TRUE)
  table
}

read_design <- function(path) {
  table <- read_table(path)
  design <- as.list(setNames(table$value, table$name))
  numbers <- setdiff(names(design), "method")
  design[numbers] <- lapply(design[numbers], as.numeric)
  design
}

place <- function(d) paste(d$seat, d$block, d$position)

# Scores as one row for each seat, glass and line. Where an untouched line of an answered
# glass counts as a value, it is filled in.
read_scores <- function(answers, glasses, seats, design) {
  scores <- answers[answers$kind == "score" & !is.na(answers$sample), c("seat", "block", "position", "sample", "item", "value")]
  if (is.na(design$absent)) return(scores)
  handed_in <- seats$seat[seats$handed_in == "yes"]
  open <- glasses[glasses$seat %in% handed_in | place(glasses) %in% place(scores), ]
  for (item in lines_with_figures()) {
    left <- open[!place(open) %in% place(scores[scores$item == item, ]), ]
    if (nrow(left) > 0) scores <- rbind(scores, data.frame(left[, c("seat", "block", "position", "sample")], item = item, value = design$absent))
  }
  scores
}
