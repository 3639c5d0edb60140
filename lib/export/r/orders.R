# Samples in an order, by people who gave all their orders whole. Several orders by one person count as their
# mean ranks.

order_figures <- function(answers, glasses, design) {
  if (!asked("order.")) return(invisible())
  orders <- answers[answers$kind == "order", ]
  ranks_of <- function(i) {
    set <- glasses[glasses$seat == orders$seat[i] & glasses$block == orders$block[i], ]
    places <- as.integer(strsplit(as.character(orders$text[i]), " ")[[1]])
    if (length(places) != nrow(set)) return(NULL)
    match(seq_len(design$samples), set$sample[match(places, set$position)])
  }
  ranks <- lapply(seq_len(nrow(orders)), ranks_of)
  kept <- !vapply(ranks, is.null, logical(1))
  by_seat <- split(ranks[kept], orders$seat[kept])
  whole <- by_seat[lengths(by_seat) == design$replicates]
  n <- length(whole)
  k <- design$samples
  put("order.assessors", n)
  if (n == 0) return(invisible())
  rows <- do.call(rbind, lapply(whole, function(own) colMeans(do.call(rbind, own))))
  # Equal mean ranks are ties, whatever their last digit.
  ranked <- t(apply(round(rows, 9), 1, rank))
  tested <- n >= 2 && asked("order.statistic")
  sums <- colSums(if (tested) ranked else rows)
  for (sample in seq_len(k)) put_all(paste0("order.sample.", sample), list(rank_sum = sums[[sample]], mean_rank = sums[[sample]] / n))
  if (!tested) return(invisible())
  statistic <- friedman.test(ranked)$statistic[[1]]
  w <- statistic / (n * (k - 1))
  put_all("order", list(statistic = statistic, df = k - 1, p = concordance_p(w, ranked), kendall_w = w, hsd = tukey_critical(design$alpha, k, Inf) * sqrt(n * k * (k + 1) / 12)))
}
