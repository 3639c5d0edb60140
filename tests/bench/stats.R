# The work of stats.bench.ts in R: `Rscript stats.R study.csv`. Prints "name median_seconds" lines.
# Three ways: aov with Error strata per descriptor; closed forms over all descriptors at once in base R;
# lmer with Satterthwaite's degrees of freedom and emmeans with Tukey-adjusted pairs, if lmerTest is installed.
file <- commandArgs(TRUE)[1]
rounds <- as.integer(Sys.getenv("BENCH_ROUNDS", "5"))
d <- read.csv(file, stringsAsFactors = TRUE)
d$assessor <- factor(d$assessor, unique(d$assessor)); d$product <- factor(d$product, unique(d$product))
D <- grep("^d[0-9]+$", names(d), value = TRUE)
I <- nlevels(d$assessor); J <- nlevels(d$product); K <- nrow(d) / (I * J)
pairs <- combn(J, 2)

# Insert-and-absorb letters from a logical vector over pairs: TRUE where the difference was shown.
letters_of <- function(shown) {
  groups <- list(seq_len(J))
  for (s in which(shown)) {
    a <- pairs[1, s]; b <- pairs[2, s]
    groups <- unlist(lapply(groups, function(g) if (a %in% g && b %in% g) list(setdiff(g, a), setdiff(g, b)) else list(g)), recursive = FALSE)
    keep <- rep(TRUE, length(groups))
    for (i in seq_along(groups)) for (j in seq_along(groups)) if (i != j && keep[j] && all(groups[[i]] %in% groups[[j]]) && (length(groups[[j]]) > length(groups[[i]]) || j < i)) { keep[i] <- FALSE; break }
    groups <- groups[keep]
  }
  groups
}
tukey <- function(means, ms, df, n) {
  q <- abs(means[pairs[2, ]] - means[pairs[1, ]]) / sqrt(ms / n)
  p <- ptukey(q, J, df, lower.tail = FALSE)
  list(p = p, hsd = qtukey(0.95, J, df) * sqrt(ms / n), letters = letters_of(p <= 0.05))
}
icc <- function(M) {
  n <- nrow(M); k <- ncol(M); g <- mean(M); MSR <- k * sum((rowMeans(M) - g)^2) / (n - 1); MSC <- n * sum((colMeans(M) - g)^2) / (k - 1)
  SST <- sum((M - g)^2); SSW <- SST - MSR * (n - 1); MSW <- SSW / (n * (k - 1)); MSE <- (SSW - MSC * (k - 1)) / ((n - 1) * (k - 1))
  F1 <- MSR / MSW; F3 <- MSR / MSE
  c((F1 - 1) / (F1 + k - 1), (MSR - MSE) / (MSR + (k - 1) * MSE + k * (MSC - MSE) / n), (F3 - 1) / (F3 + k - 1),
    qf(.975, n - 1, n * (k - 1)), qf(.975, n * (k - 1), n - 1), qf(.975, n - 1, (n - 1) * (k - 1)), qf(.975, (n - 1) * (k - 1), n - 1))
}
performance_of <- function(cell, mse) { # cell: I x J means, mse: per assessor
  others <- sapply(seq_len(I), function(i) colMeans(cell[-i, , drop = FALSE]))
  list(f = K * apply(cell, 1, var) / mse, r = sapply(seq_len(I), function(i) cor(cell[i, ], others[, i])), s = sqrt(mse))
}

with_aov <- function() {
  out <- lapply(D, function(v) {
    a <- summary(aov(d[[v]] ~ product + Error(assessor / product), d))
    inner <- a[["Error: assessor:product"]][[1]]
    means <- tapply(d[[v]], d$product, mean)
    cell <- tapply(d[[v]], list(d$assessor, d$product), mean)
    mse <- sapply(split(d, d$assessor), function(s) deviance(lm(s[[v]] ~ s$product)) / (J * (K - 1)))
    list(a, tukey(means, inner[2, "Mean Sq"], inner[2, "Df"], I * K), performance_of(cell, mse), icc(t(cell)))
  })
  list(out, prcomp(sapply(D, function(v) tapply(d[[v]], d$product, mean))))
}

closed <- function() {
  d <- d[order(d$assessor, d$product), ]
  Y <- as.matrix(d[, D]); code <- (as.integer(d$assessor) - 1L) * J + as.integer(d$product)
  C <- rowsum(Y, code, reorder = TRUE) / K
  ia <- rep(seq_len(I), each = J); ip <- rep(seq_len(J), I)
  A <- rowsum(C, ia) / J; P <- rowsum(C, ip) / I; G <- colMeans(C)
  SSP <- I * K * colSums(sweep(P, 2, G)^2); SSA <- J * K * colSums(sweep(A, 2, G)^2)
  SSI <- K * colSums((C - A[ia, ] - P[ip, ] + rep(G, each = I * J))^2)
  R <- (Y - C[code, ])^2; SSE <- colSums(R)
  msi <- SSI / ((I - 1) * (J - 1)); f <- SSP / (J - 1) / msi; p <- pf(f, J - 1, (I - 1) * (J - 1), lower.tail = FALSE)
  mse <- rowsum(R, as.integer(d$assessor)) / (J * (K - 1))
  out <- lapply(seq_along(D), function(v) { cell <- matrix(C[, v], I, J, byrow = TRUE)
    list(tukey(P[, v], msi[v], (I - 1) * (J - 1), I * K), performance_of(cell, mse[, v]), icc(t(cell))) })
  list(f, p, SSA, SSE, out, prcomp(P))
}

mixed <- function() lapply(D, function(v) {
  m <- lmerTest::lmer(d[[v]] ~ product + (1 | assessor) + (1 | assessor:product), d)
  list(anova(m), summary(graphics::pairs(emmeans::emmeans(m, "product", lmer.df = "satterthwaite"), adjust = "tukey")))
})

median_of <- function(f) { f(); median(sapply(seq_len(rounds), function(i) system.time(f())[["elapsed"]])) }
# The quick one is timed over many runs at once: the clock of system.time ticks in milliseconds.
cat("aov", median_of(with_aov), "\n")
cat("closed", median_of(function() for (i in 1:5) closed()) / 5, "\n")
if (requireNamespace("lmerTest", quietly = TRUE) && requireNamespace("emmeans", quietly = TRUE)) {
  suppressPackageStartupMessages(library(emmeans))
  cat("mixed", suppressMessages(suppressWarnings(median_of(mixed))), "\n")
}
