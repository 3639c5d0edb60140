# Figures that were computed, figures that could not be, and the comparison.

computed <- new.env()
skipped <- new.env()

put <- function(id, value) if (length(value) == 1 && is.finite(value)) assign(id, as.numeric(value), envir = computed)
put_all <- function(prefix, values) for (name in names(values)) put(paste(prefix, name, sep = "."), values[[name]])
skip <- function(prefix, reason) assign(prefix, reason, envir = skipped)

asked <- function(prefix) any(startsWith(figures$id, prefix))
lines_with_figures <- function() sort(unique(as.integer(sub("^line\\.([0-9]+)\\..*", "\\1", grep("^line\\.", figures$id, value = TRUE)))))

reason_to_skip <- function(id) {
  for (prefix in ls(skipped)) if (startsWith(id, prefix)) return(get(prefix, envir = skipped))
  NA
}

# How far two figures may lie apart: one part in a million. What may lie near 0 (p of pairs, limits, differences,
# F) also passes when it is closer than 1e-8, or 1e-6 points where both sides search for the best fit.
allowed <- function(id, a, b) {
  is_p <- grepl("\\.p$", id)
  floor <- if (is_p && !grepl(".pair.", id, fixed = TRUE)) 0 else if (!is_p && grepl(".mixed.", id, fixed = TRUE)) 1e-6 else 1e-8
  max(1e-6 * max(abs(a), abs(b)), floor)
}

compare_figures <- function(figures) {
  number <- function(x) formatC(x, digits = 10, width = 18, format = "g")
  counts <- c(agree = 0, differ = 0, missing = 0, skipped = 0)
  cat(sprintf("%-36s %18s %18s %12s\n", "figure", "app", "R", "difference"))
  for (i in seq_len(nrow(figures))) {
    id <- figures$id[i]
    app <- figures$value[i]
    reason <- reason_to_skip(id)
    if (exists(id, envir = computed, inherits = FALSE)) {
      own <- get(id, envir = computed)
      differs <- is.na(app) || abs(app - own) > allowed(id, app, own)
      counts[if (differs) "differ" else "agree"] <- counts[if (differs) "differ" else "agree"] + 1
      cat(sprintf("%-36s %s %s %12.2g%s\n", id, number(app), number(own), own - app, if (differs) "  DIFFERS" else ""))
    } else if (!is.na(reason)) {
      counts["skipped"] <- counts["skipped"] + 1
      cat(sprintf("%-36s %s %18s %12s  skipped: %s\n", id, number(app), "", "", reason))
    } else {
      counts["missing"] <- counts["missing"] + 1
      cat(sprintf("%-36s %s %18s %12s  NOT COMPUTED\n", id, number(app), "", ""))
    }
  }
  cat(sprintf("\n%d figures: %d agree, %d differ, %d not computed, %d skipped\n", nrow(figures), counts["agree"], counts["differ"], counts["missing"], counts["skipped"]))
  if (nrow(figures) == 0) cat("There is nothing to compare.\n")
  counts[["differ"]] + counts[["missing"]] == 0
}
