# Choices. What is right is told from the glasses that stood before the seat; the test then takes any number
# correct of n against any chance.

chosen_sets <- function(answers, glasses) {
  choices <- answers[answers$kind == "choice", ]
  lapply(seq_len(nrow(choices)), function(i) {
    set <- glasses[glasses$seat == choices$seat[i] & glasses$block == choices$block[i], ]
    set <- set[order(set$position), ]
    picked <- set$sample[match(na.omit(c(choices$position[i], choices$position_2[i])), set$position)]
    list(samples = set$sample, picked = picked, guess = identical(choices$guess[i], "yes"))
  })
}

odd_one <- function(set) sum(set$samples == set$picked[1]) == 1
like_the_first <- function(set) set$picked[1] == set$samples[1]
alike <- function(set) set$picked[1] == set$picked[2]
alike_and_two <- function(set) alike(set) && sum(set$samples == set$picked[1]) == 2

# Thurstone's model: the share correct of two samples that lie d apart.
by_integral <- function(inside, from) function(d) integrate(function(z) inside(z, d), from, Inf, rel.tol = 1e-12, abs.tol = 0)$value
triangle_share <- by_integral(function(z, d) 2 * dnorm(z) * (pnorm(-z * sqrt(3) + d * sqrt(2 / 3)) + pnorm(-z * sqrt(3) - d * sqrt(2 / 3))), 0)
tetrad_share <- function(d) 1 - 2 * by_integral(function(z, d) dnorm(z) * (2 * pnorm(z) * pnorm(z - d) - pnorm(z - d)^2), -Inf)(d)
duo_trio_share <- function(d) 1 - pnorm(d / sqrt(2)) - pnorm(d / sqrt(6)) + 2 * pnorm(d / sqrt(2)) * pnorm(d / sqrt(6))

# A further method with a right answer is a line here.
choice_methods <- list(
  triangle = list(picks = 1, is_right = odd_one, share = triangle_share),
  tetrad = list(picks = 2, is_right = alike, share = tetrad_share),
  duo_trio = list(picks = 1, is_right = like_the_first, share = duo_trio_share),
  duo_trio_constant = list(picks = 1, is_right = like_the_first, share = duo_trio_share),
  two_of_five = list(picks = 2, is_right = alike_and_two, share = NULL))

# Smallest x with P(X >= x) at most alpha; NA when there is none.
least_correct <- function(n, alpha, chance) {
  x <- qbinom(alpha, n, chance, lower.tail = FALSE) + 1
  # A tail that equals alpha but for rounding counts as significant.
  if (pbinom(x - 2, n, chance, lower.tail = FALSE) <= alpha * (1 + 1e-12)) x <- x - 1
  if (x > n) NA else x
}

power_of <- function(n, alpha, chance, share) {
  x <- least_correct(n, alpha, chance)
  if (is.na(x)) 0 else pbinom(x - 1, n, chance + share * (1 - chance), lower.tail = FALSE)
}

# The test of `correct` answers of `n` against guessing with probability `chance`.
choice_test <- function(correct, n, chance, alpha) {
  put("choice.p", binom.test(correct, n, chance, alternative = "greater")$p.value)
  put("choice.minimum_correct", least_correct(n, alpha, chance))
  as_share <- function(p) (p - chance) / (1 - chance)
  limits <- binom.test(correct, n)$conf.int
  put_all("choice.pd", list(value = as_share(correct / n), low = as_share(limits[1]), high = as_share(limits[2])))
  for (share in c(20, 30, 50, 70)) put(paste0("choice.power.", share), power_of(n, alpha, chance, share / 100))
}

needed_for_half <- function(alpha, chance) {
  n <- 1
  while (power_of(n, alpha, chance, 0.5) < 0.8) n <- n + 1
  n
}

# d' with the limits where twice the log likelihood falls by the chi-square quantile.
size_of <- function(correct, n, chance, share) {
  size_at <- function(p) {
    if (p <= chance) return(0)
    if (p >= 1) return(Inf)
    uniroot(function(d) share(d) - p, c(0, 15), tol = 1e-13)$root
  }
  log_likelihood <- function(p) dbinom(correct, n, p, log = TRUE)
  best <- max(correct / n, chance)
  fall <- function(p) log_likelihood(p) - log_likelihood(best) + qchisq(0.95, 1) / 2
  low <- if (fall(chance) >= 0) chance else uniroot(fall, c(chance, best), tol = 1e-15)$root
  high <- if (correct == n) 1 else uniroot(fall, c(best, 1 - 1e-12), tol = 1e-15)$root
  put_all("choice.d_prime", list(value = size_at(correct / n), low = size_at(low), high = size_at(high)))
}

choice_figures <- function(answers, glasses, design) {
  method <- choice_methods[[design$method]]
  if (!asked("choice.") || is.null(method)) return(invisible())
  sets <- Filter(function(set) length(set$picked) == method$picks, chosen_sets(answers, glasses))
  right <- vapply(sets, method$is_right, logical(1))
  guess <- vapply(sets, function(set) set$guess, logical(1))
  n <- length(sets)
  put_all("choice", list(
    n = n, correct = sum(right), guesses = sum(guess), correct_guesses = sum(right & guess),
    unanswered = nrow(unique(glasses[, c("seat", "block")])) - n, needed_for_half = needed_for_half(design$alpha, design$chance)))
  if (n == 0) return(invisible())
  choice_test(sum(right), n, design$chance, design$alpha)
  if (!is.null(method$share)) size_of(sum(right), n, design$chance, method$share)
}

# Two samples of which none is right: both are chosen equally often?
pair_figures <- function(answers, glasses, design) {
  if (!asked("pair.")) return(invisible())
  picked <- unlist(lapply(chosen_sets(answers, glasses), function(set) set$picked[1]))
  n <- length(picked)
  first <- sum(picked == 1)
  put_all("pair", list(n = n, unanswered = nrow(unique(glasses[, c("seat", "block")])) - n))
  put_all("pair.chosen", list("1" = first, "2" = n - first))
  if (n == 0) return(invisible())
  test <- binom.test(first, n)
  put_all("pair", list(p = test$p.value, needed = least_correct(n, design$alpha / 2, 1 / 2)))
  put_all("pair.share", list(value = first / n, low = test$conf.int[1], high = test$conf.int[2]))
}
