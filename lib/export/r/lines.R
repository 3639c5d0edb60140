# Scores line by line: analysis of variance with panelists as a random sample of people, Tukey's
# differences, agreement, and the place in the flight. Base R.

as_levels <- function(d, samples) transform(d, seat = factor(seat), sample = factor(sample, levels = seq_len(samples)), place = factor(position))

# Panelists who scored every glass on the line.
whole_table <- function(d, design) {
  scored <- table(d$seat)
  d[d$seat %in% as.integer(names(scored)[scored == design$samples * design$replicates]), ]
}

cell_means <- function(d) tapply(d$value, list(d$seat, d$sample), mean)

put_test <- function(prefix, f, df1, df2) put_all(prefix, list(F = f, df1 = df1, df2 = df2, p = pf(f, df1, df2, lower.tail = FALSE)))

# One row of a table of analysis of variance.
stratum <- function(fit, name) {
  table <- summary(fit)[[paste("Error:", name)]][[1]]
  row.names(table) <- trimws(row.names(table))
  table
}

analyse_line <- function(prefix, full, design) {
  d <- as_levels(full, design$samples)
  fit <- aov(value ~ sample + Error(seat / sample), data = d)
  between <- stratum(fit, "seat")["Residuals", ]
  within <- stratum(fit, "seat:sample")
  error <- within["Residuals", ]
  put_test(paste0(prefix, ".product"), within["sample", "Mean Sq"] / error[["Mean Sq"]], within["sample", "Df"], error[["Df"]])
  put_test(paste0(prefix, ".assessor"), between[["Mean Sq"]] / error[["Mean Sq"]], between[["Df"]], error[["Df"]])
  if (design$replicates > 1) {
    repeats <- stratum(fit, "Within")["Residuals", ]
    put_test(paste0(prefix, ".interaction"), error[["Mean Sq"]] / repeats[["Mean Sq"]], error[["Df"]], repeats[["Df"]])
  }
  compare_pairs(prefix, tapply(d$value, d$sample, mean), nrow(d) / design$samples, error[["Mean Sq"]], error[["Df"]], design$alpha)
  use_of_scale(prefix, d, error[["Sum Sq"]], design)
}

compare_pairs <- function(prefix, means, n, ms, df, alpha) {
  k <- length(means)
  reach <- tukey_critical(alpha, k, df) * sqrt(ms / n)
  put(paste0(prefix, ".smallest_difference"), reach)
  for (a in seq_len(k)) {
    put_all(paste(prefix, "sample", a, sep = "."), list(mean = means[[a]], n = n, low = means[[a]] - reach / 2, high = means[[a]] + reach / 2))
    for (b in seq_len(k)[seq_len(k) > a]) {
      difference <- means[[b]] - means[[a]]
      p <- range_tail(abs(difference) / sqrt(ms / n), k, df)
      put_all(paste(prefix, "pair", a, b, sep = "."), list(difference = difference, low = difference - reach, high = difference + reach, p = p))
    }
  }
}

# Each panelist's slope on the panel's means; how far the slopes lie from 1, over what else they disagree in.
use_of_scale <- function(prefix, d, interaction, design) {
  if (design$samples < 3) return(invisible())
  cells <- cell_means(d)
  x <- colMeans(cells) - mean(cells)
  slopes <- apply(cells, 1, function(own) coef(lm(own ~ x))[["x"]])
  scaling <- design$replicates * sum(x^2) * sum((slopes - 1)^2)
  df1 <- nrow(cells) - 1
  df2 <- df1 * (design$samples - 2)
  put_test(paste0(prefix, ".scaling"), (scaling / df1) / ((interaction - scaling) / df2), df1, df2)
}

# The p of W: Iman and Davenport's F. Where all agree completely F has no value; the p is then the
# chance that all the others repeat the first one's order. `ranks`: a row for each person.
concordance_p <- function(w, ranks) {
  others <- nrow(ranks) - 1
  k <- ncol(ranks)
  if (w > 1 - 1e-12) return((factorial(k) / prod(factorial(table(ranks[1, ]))))^-others)
  pf(others * w / (1 - w), k - 1, others * (k - 1), lower.tail = FALSE)
}

# Kendall's W and ICC(2,k) (Shrout and Fleiss 1979; McGraw and Wong 1996) of the panelists' means.
agreement_of <- function(prefix, full, design) {
  cells <- cell_means(as_levels(full, design$samples))
  judges <- nrow(cells)
  n <- ncol(cells)
  w <- friedman.test(cells)$statistic[[1]] / (judges * (n - 1))
  put(paste0(prefix, ".kendall_w"), w)
  put(paste0(prefix, ".kendall_p"), concordance_p(w, t(apply(round(cells, 9), 1, rank))))
  long <- data.frame(value = c(cells), judge = factor(c(row(cells))), target = factor(c(col(cells))))
  ms <- anova(lm(value ~ target + judge, long))[["Mean Sq"]]
  limits <- icc_limits(ms[1], ms[2], ms[3], n, judges)
  put_all(paste0(prefix, ".icc"), list(value = (ms[1] - ms[3]) / (ms[1] + (ms[2] - ms[3]) / n), low = limits[1], high = limits[2]))
}

icc_limits <- function(targets, judges, error, n, k, level = 0.95) {
  icc <- (targets - error) / (targets + (k - 1) * error + k * (judges - error) / n)
  a <- k * icc / (n * (1 - icc))
  b <- 1 + k * icc * (n - 1) / (n * (1 - icc))
  v <- (a * judges + b * error)^2 / ((a * judges)^2 / (k - 1) + (b * error)^2 / ((n - 1) * (k - 1)))
  above <- qf(1 - (1 - level) / 2, n - 1, v)
  below <- qf(1 - (1 - level) / 2, v, n - 1)
  single <- c(
    n * (targets - above * error) / (above * (k * judges + (k * n - k - n) * error) + n * targets),
    n * (below * targets - error) / (k * judges + (k * n - k - n) * error + n * below * targets))
  k * single / (1 + (k - 1) * single)
}

# The place in the flight after panelists and samples (type II).
place_in_flight <- function(prefix, d, design) {
  d <- droplevels(as_levels(d, design$samples))
  # A factor with one level says nothing, and lm refuses it.
  others <- Filter(function(name) nlevels(d[[name]]) > 1, c("seat", "sample"))
  with_place <- lm(reformulate(c(others, "place"), "value"), d)
  without <- lm(reformulate(c("1", others), "value"), d)
  df1 <- without$df.residual - with_place$df.residual
  # Rounding may leave the sum of squares of a place without any effect a hair below 0.
  gained <- max(0, deviance(without) - deviance(with_place))
  put_test(prefix, (gained / df1) / (deviance(with_place) / with_place$df.residual), df1, with_place$df.residual)
  effects <- coef(with_place)[grepl("^place", names(coef(with_place)))]
  if (anyNA(effects)) skip(paste0(prefix, ".span"), "places can't be told apart one by one")
  else put(paste0(prefix, ".span"), diff(range(c(0, effects))))
}

line_figures <- function(scores, design) {
  for (item in lines_with_figures()) {
    prefix <- paste0("line.", item)
    d <- scores[scores$item == item, ]
    if (nrow(d) == 0) next
    full <- whole_table(d, design)
    margin <- 0.02 * (design$scale_high - design$scale_low)
    put(paste0(prefix, ".at_ends"), mean(d$value <= design$scale_low + margin | d$value >= design$scale_high - margin))
    for (sample in seq_len(design$samples)) {
      put(paste(prefix, "plain.mean", sample, sep = "."), mean(d$value[d$sample == sample]))
      put(paste(prefix, "complete.mean", sample, sep = "."), mean(full$value[full$sample == sample]))
    }
    if (asked(paste0(prefix, ".anova."))) analyse_line(paste0(prefix, ".anova"), full, design)
    if (asked(paste0(prefix, ".mixed."))) analyse_gaps(paste0(prefix, ".mixed"), d, design)
    if (asked(paste0(prefix, ".kendall_w")) || asked(paste0(prefix, ".icc"))) agreement_of(prefix, full, design)
    if (asked(paste0(prefix, ".position"))) place_in_flight(paste0(prefix, ".position"), d, design)
  }
}
