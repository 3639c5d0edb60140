# Lines that not everybody scored wholly: the same model by restricted maximum likelihood with
# Kenward and Roger's degrees of freedom, over everybody who scored a glass. Needs lme4, lmerTest, pbkrtest.

has_mixed_models <- function() all(vapply(c("lme4", "lmerTest", "pbkrtest"), requireNamespace, logical(1), quietly = TRUE))

# The usual optimizers stop where the likelihood no longer changes, and variances are then good to four or
# five digits. Newton's steps on its slope go on to where that is 0. minqa and numDeriv come with lme4 and lmerTest.
sharp_minimum <- function(fn, par, lower, upper, control, ...) {
  near <- minqa::bobyqa(par, fn, lower, upper, control = list(rhobeg = 0.2, rhoend = 1e-8, maxfun = 1e5))
  at <- near$par
  for (step in 1:3) {
    free <- at - lower > 1e-3
    if (!any(free)) break
    along <- function(x) fn(replace(at, free, x))
    curvature <- numDeriv::hessian(along, at[free])
    if (min(eigen(curvature, TRUE, TRUE)$values) <= 0) break
    next_at <- replace(at, free, at[free] - solve(curvature, numDeriv::grad(along, at[free])))
    if (any(next_at < lower) || fn(next_at) > fn(at) + 1e-9) break
    at <- next_at
  }
  list(par = at, fval = fn(at), feval = near$feval, conv = 0, message = "")
}

analyse_gaps <- function(prefix, d, design) {
  if (!has_mixed_models()) return(skip(prefix, "needs the packages lme4, lmerTest and pbkrtest"))
  d <- as_levels(d, design$samples)
  # With one score a cell, interaction and error are one.
  repeated <- any(table(d$seat, d$sample) > 1)
  model <- if (repeated) value ~ 0 + sample + (1 | seat) + (1 | seat:sample) else value ~ 0 + sample + (1 | seat)
  # What lmerTest warns of at a variance of 0 concerns Satterthwaite's degrees of freedom, which are not used.
  control <- lme4::lmerControl(optimizer = sharp_minimum, calc.derivs = FALSE, check.conv.singular = lme4::.makeCC("ignore", tol = 1e-9))
  fit <- suppressWarnings(lmerTest::lmer(model, data = d, control = control))
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
