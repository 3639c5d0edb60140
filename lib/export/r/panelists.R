# How each panelist did, over the lines that he or she scored wholly.

# Whether the line showed a difference; NA where the packages for it are missing.
was_shown <- function(item, design) {
  for (family in c("anova", "mixed")) {
    id <- paste("line", item, family, "product.p", sep = ".")
    if (exists(id, envir = computed, inherits = FALSE)) return(get(id, envir = computed) <= design$alpha)
    if (!is.na(reason_to_skip(id))) return(NA)
  }
  FALSE
}

# One panelist on one line: correlation with the mean of the others, own F of the samples, error.
own_figures <- function(full, seat, design) {
  cells <- cell_means(full)
  own <- cells[as.character(seat), ]
  others <- colMeans(cells[row.names(cells) != as.character(seat), , drop = FALSE])
  # Means that differ by rounding only do not differ.
  flat <- sd(own) < 1e-9 || sd(others) < 1e-9
  mine <- full[full$seat == seat, ]
  error <- if (design$replicates > 1) sum((mine$value - ave(mine$value, mine$sample))^2) / (design$samples * (design$replicates - 1)) else NA
  f <- design$replicates * var(own) / error
  df <- c(design$samples - 1, design$samples * (design$replicates - 1))
  list(agreement = if (flat) NA else cor(own, others), error = error, f = f, p = if (is.nan(f) || is.na(f)) NA else pf(f, df[1], df[2], lower.tail = FALSE))
}

panelist_figures <- function(scores, design) {
  if (!asked("seat.")) return(invisible())
  rows <- list()
  for (item in lines_with_figures()) {
    full <- whole_table(scores[scores$item == item, ], design)
    seats <- sort(unique(full$seat))
    if (length(seats) < 2) next
    shown <- was_shown(item, design)
    for (seat in seats) rows[[length(rows) + 1]] <- data.frame(seat = seat, shown = shown, own_figures(full, seat, design))
  }
  rows <- do.call(rbind, rows)
  for (seat in unique(rows$seat)) {
    own <- rows[rows$seat == seat, ]
    prefix <- paste0("seat.", seat)
    if (anyNA(own$shown)) skip(paste0(prefix, ".agreement"), "which lines showed a difference needs the packages for lines with gaps")
    else put(paste0(prefix, ".agreement"), mean(own$agreement[own$shown], na.rm = TRUE))
    tested <- own[!is.na(own$p), ]
    if (nrow(tested) > 0) put(paste0(prefix, ".discriminated"), sum(tested$p <= design$alpha))
    best <- tested[is.finite(tested$f), ]
    best <- best[which.max(best$f), ]
    if (nrow(best) > 0) put_all(prefix, list(best_F = best$f, best_p = best$p))
    if (design$replicates > 1) put(paste0(prefix, ".repeatability"), sqrt(mean(own$error)))
  }
}
