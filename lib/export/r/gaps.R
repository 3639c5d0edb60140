# Lines that not everybody scored wholly: the same model by restricted maximum likelihood with
# Kenward and Roger's degrees of freedom, over everybody who scored a glass. Needs lme4, lmerTest, pbkrtest.

has_mixed_models <- function() all(vapply(c("lme4", "lmerTest", "pbkrtest"), requireNamespace, logical(1), quietly = TRUE))

analyse_gaps <- function(prefix, d, design) {
  if (!has_mixed_models()) return(skip(prefix, "needs the packages lme4, lmerTest and pbkrtest"))
  d <- as_levels(d, design$samples)
  # With one score a cell, interaction and error are one.
  repeated <- any(table(d$seat, d$sample) > 1)
  model <- if (repeated) value ~ 0 + sample + (1 | seat) + (1 | seat:sample) else value ~ 0 + sample + (1 | seat)
  control <- lme4::lmerControl(
    optimizer = "bobyqa", calc.derivs = FALSE, optCtrl = list(rhobeg = 0.02, rhoend = 1e-9, maxfun = 1e5),
    check.conv.singular = lme4::.makeCC("ignore", tol = 1e-9))
  fit <- lmerTest::lmer(model, data = d, control = control)
  k <- design$samples
  contrasts <- cbind(-1, diag(k - 1))
  test <- lmerTest::contest(fit, contrasts, joint = TRUE, ddf = "Kenward-Roger")
  put_all(paste0(prefix, ".product"), list(F = test[["F value"]], df1 = test[["NumDF"]], df2 = test[["DenDF"]], p = test[["Pr(>F)"]]))
  means <- lme4::fixef(fit)
  needed <- 0
  for (a in seq_len(k)) for (b in seq_len(k)[seq_len(k) > a]) {
    pair <- lmerTest::contest1D(fit, (seq_len(k) == b) - (seq_len(k) == a), ddf = "Kenward-Roger")
    reach <- tukey_critical(design$alpha, k, pair[["df"]]) / sqrt(2) * pair[["Std. Error"]]
    needed <- max(needed, reach)
    p <- range_tail(abs(pair[["t value"]]) * sqrt(2), k, pair[["df"]])
    put_all(paste(prefix, "pair", a, b, sep = "."), list(difference = pair[["Estimate"]], low = pair[["Estimate"]] - reach, high = pair[["Estimate"]] + reach, p = p))
  }
  put(paste0(prefix, ".smallest_difference"), needed)
  for (a in seq_len(k)) {
    put_all(paste(prefix, "sample", a, sep = "."), list(mean = means[[a]], n = sum(d$sample == a), low = means[[a]] - needed / 2, high = means[[a]] + needed / 2))
  }
}
