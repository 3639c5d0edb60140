# The studentized range. ptukey loses digits where the degrees of freedom are few (with 2, a critical value by a
# thousandth), and qtukey stops at four decimals. So the tail is summed here from its definition and held against ptukey
# where that one is good. Both sums are of smooth bells, for which equal steps are exact to all digits.

# P(range of k standard normal values > w), for each w.
normal_range_tail <- function(w, k) {
  z <- seq(-9, 9, by = 0.05)
  inside <- outer(w, z, function(w, z) dnorm(z) * (pnorm(z) - pnorm(z - w))^(k - 1))
  1 - 0.05 * k * rowSums(inside)
}

# P(studentized range of k values on df degrees of freedom > q).
range_tail <- function(q, k, df) {
  if (is.infinite(df)) return(normal_range_tail(q, k))
  # Steps of the logarithm of s, the standard deviation's estimate over its true value.
  width <- 1 / sqrt(2 * df)
  step <- min(0.1, width / 2)
  u <- seq(-(40 / df + 10 * width), 10 * width, by = step)
  density <- 2 * exp(df / 2 * log(df / 2) - lgamma(df / 2) + df * u - df * exp(2 * u) / 2)
  tail <- step * sum(density * normal_range_tail(q * exp(u), k))
  if (df >= 20) stopifnot(abs(tail - ptukey(q, k, df, lower.tail = FALSE)) < 1e-6)
  tail
}

# The q that is passed with probability alpha.
tukey_critical <- function(alpha, k, df) {
  near <- qtukey(1 - alpha, k, max(2, df))
  uniroot(function(q) log(range_tail(q, k, df) / alpha), near * c(0.99, 1.01), extendInt = "downX", tol = 1e-12 * near)$root
}
