/**
 * The script of a reproduce bundle: base R only. It reads the answers, computes the figures anew by R's own
 * functions, and holds them against the report's. It ends with status 1 when one differs.
 */
export const REPRODUCE_R = String.raw`# Computes the report's figures from the answers, and compares. Base R, nothing to install.
#   Rscript reproduce.R
answers <- read.csv("answers.csv", fileEncoding = "UTF-8-BOM", stringsAsFactors = FALSE, colClasses = c(code = "character"))
session <- read.csv("session.csv", fileEncoding = "UTF-8-BOM", stringsAsFactors = FALSE)
told <- read.csv("figures.csv", fileEncoding = "UTF-8-BOM", stringsAsFactors = FALSE, colClasses = c(id = "character", value = "numeric"))
alpha <- session$alpha
chance <- session$chance
replicates <- session$replicates
found <- c()
say <- function(id, value) found[[id]] <<- value
samples <- seq_len(session$samples)
say("samples", session$samples)

# Sets of glasses: which were picked, and was that right?
picks <- answers[answers$kind == "pick", ]
if (nrow(picks) > 0) {
  sets <- split(picks, list(picks$seat, picks$block), drop = TRUE)
  n <- length(sets)
  say("answers", n)
  if (session$family == "pair") {
    chosen <- sapply(sets, function(s) s$sample[s$value == 1])
    for (k in samples) say(paste("chosen", k), sum(chosen == k))
    first <- sum(chosen == 1)
    test <- binom.test(first, n, 0.5)
    say("p", min(1, 2 * pbinom(min(first, n - first), n, 0.5)))
    say("share low", test$conf.int[1])
    say("share high", test$conf.int[2])
  } else {
    right <- sapply(sets, function(s) {
      s <- s[order(s$position), ]
      picked <- s$sample[s$value == 1]
      alike <- sum(s$sample == picked[1])
      switch(session$protocol,
        triangle = alike == 1,
        tetrad = picked[1] == picked[2],
        duo_trio = picked[1] == s$sample[1],
        two_of_five = picked[1] == picked[2] && alike == 2)
    })
    correct <- sum(right)
    say("correct", correct)
    say("p", binom.test(correct, n, chance, alternative = "greater")$p.value)
    least <- which(pbinom(0:n - 1, n, chance, lower.tail = FALSE) <= alpha * (1 + 1e-12))
    if (length(least) > 0) say("needed", min(least) - 1)
    limits <- binom.test(correct, n)$conf.int
    say("distinguishers", (correct / n - chance) / (1 - chance))
    say("distinguishers low", (limits[1] - chance) / (1 - chance))
    say("distinguishers high", (limits[2] - chance) / (1 - chance))
  }
}

# Orders: mean ranks of people whose orders are whole.
ranks <- answers[answers$kind == "rank", ]
if (nrow(ranks) > 0) {
  counts <- table(ranks$seat)
  whole <- as.integer(names(counts)[counts == replicates * length(samples)])
  ranks <- ranks[ranks$seat %in% whole, ]
  say("people", length(whole))
  if (length(whole) > 1) {
    means <- tapply(ranks$value, list(ranks$seat, ranks$sample), mean)
    own <- t(apply(means, 1, rank))
    for (k in samples) say(paste("rank sum", k), sum(own[, k]))
    test <- friedman.test(own)
    say("chi-square", unname(test$statistic))
    say("Kendall's W", unname(test$statistic) / (nrow(own) * (ncol(own) - 1)))
  }
}

# Scales: panelists who scored every glass, product over the panelist x sample interaction.
scored <- answers[answers$kind %in% c("line", "category", "rate", "liking"), ]
for (i in unique(scored$item)) {
  d <- scored[scored$item == i, ]
  counts <- table(d$seat)
  d <- d[d$seat %in% names(counts)[counts == replicates * length(samples)], ]
  people <- length(unique(d$seat))
  if (people < 2 || length(samples) < 2) next
  d$a <- factor(d$seat)
  d$s <- factor(d$sample)
  means <- tapply(d$value, d$sample, mean)
  for (k in samples) say(paste0("mean ", i, "/", k), means[[as.character(k)]])
  fit <- if (replicates > 1) anova(lm(value ~ a * s, d)) else anova(lm(value ~ a + s, d))
  error <- if (replicates > 1) fit["a:s", ] else fit["Residuals", ]
  ms <- error[["Mean Sq"]]
  df <- error[["Df"]]
  f <- fit["s", "Mean Sq"] / ms
  say(paste("F", i), f)
  say(paste("p", i), pf(f, fit["s", "Df"], df, lower.tail = FALSE))
  if (replicates > 1) say(paste("interaction F", i), ms / fit["Residuals", "Mean Sq"])
  n <- people * replicates
  say(paste("HSD", i), qtukey(1 - alpha, length(samples), df) * sqrt(ms / n))
  for (a in samples) for (b in samples) if (a < b) {
    say(paste0("pair p ", i, "/", a, "-", b), ptukey(abs(means[[a]] - means[[b]]) / sqrt(ms / n), length(samples), df, lower.tail = FALSE))
  }
}

# Words: how often each was ticked or named, out of the glasses that were answered.
words <- answers[answers$kind %in% c("check", "term"), ]
for (i in unique(words$item)) for (k in samples) {
  d <- words[words$item == i & words$sample == k, ]
  say(paste0("ticked ", i, "/", k), sum(d$value > 0))
  say(paste0("of ", i, "/", k), nrow(d))
}

# How much is right: shares, and liking lost against those who found it just right.
rights <- answers[answers$kind == "just_right", ]
likes <- answers[answers$kind == "liking", ]
both <- merge(rights, likes[, c("seat", "block", "position", "value")], by = c("seat", "block", "position"), suffixes = c("", ".liking"))
for (i in unique(both$item)) for (k in samples) {
  d <- both[both$item == i & both$sample == k, ]
  if (nrow(d) == 0) next
  right <- mean(d$value.liking[d$value == 3])
  say(paste0("answers ", i, "/", k), nrow(d))
  say(paste0("too little ", i, "/", k), mean(d$value < 3))
  say(paste0("too much ", i, "/", k), mean(d$value > 3))
  say(paste0("drop low ", i, "/", k), right - mean(d$value.liking[d$value < 3]))
  say(paste0("drop high ", i, "/", k), right - mean(d$value.liking[d$value > 3]))
}

told$R <- sapply(told$id, function(id) if (is.null(found[[id]])) NA else as.numeric(found[[id]]))
# ptukey's own upper tail is good to about 1e-6; everything else is compared to six digits.
most <- ifelse(grepl("^pair p", told$id), 1e-5, 1e-6 * pmax(abs(told$value), 1e-3))
told$differs <- is.na(told$R) | abs(told$R - told$value) > most
print(told, digits = 10, row.names = FALSE)
cat(sum(!told$differs), "of", nrow(told), "figures agree\n")
quit(status = as.integer(any(told$differs)))
`;
