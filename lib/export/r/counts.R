# Counts: answers, faults, ticked words, points of "too little, right, too much".

count_figures <- function(answers, glasses, seats) {
  put("answers.counted", nrow(answers))
  answered <- unique(answers[answers$kind != "order" & !is.na(answers$sample), c("seat", "block", "position", "sample")])
  parts <- function(prefix) strsplit(grep(paste0("^", prefix, "\\."), figures$id, value = TRUE), ".", fixed = TRUE)
  for (part in parts("fault")) {
    noted <- answers$kind == "fault" & answers$item %in% as.integer(part[2]) & answers$sample %in% as.integer(part[3])
    put_all(paste(part[1:3], collapse = "."), list(noted = sum(noted), of = sum(answered$sample == as.integer(part[3]))))
  }
  # A word that was left alone on an answered glass counts as no.
  of <- glasses[glasses$seat %in% seats$seat[seats$handed_in == "yes"] | place(glasses) %in% place(answered), ]
  for (part in parts("tick")) {
    item <- as.integer(part[2])
    named <- answers[answers$kind == "score" & answers$item %in% item & answers$sample %in% as.integer(part[3]) & answers$value %in% 1:9, ]
    put_all(paste(part[1:3], collapse = "."), list(ticked = nrow(named), of = sum(of$sample == as.integer(part[3])), strength = mean(named$value)))
  }
}

# Glasses with an overall liking only: the liking lost is that against those who found it just right.
right_figures <- function(answers) {
  ids <- unique(sub("^(right\\.[0-9]+\\.[0-9]+)\\..*", "\\1", grep("^right\\.", figures$id, value = TRUE)))
  items <- as.integer(sub("^right\\.([0-9]+)\\..*", "\\1", ids))
  liking <- answers[answers$kind == "score" & answers$item %in% lines_with_figures(), ]
  for (i in seq_along(ids)) {
    sample <- as.integer(sub(".*\\.", "", ids[i]))
    own <- answers[answers$kind == "score" & answers$item %in% items[i] & answers$sample %in% sample & place(answers) %in% place(liking), ]
    liked <- liking$value[match(place(own), place(liking))]
    drop <- function(side) mean(liked[own$value == 3]) - mean(liked[side])
    put_all(ids[i], list(
      n = nrow(own), share = mean(own$value == 3), low_share = mean(own$value < 3), low_drop = drop(own$value < 3),
      high_share = mean(own$value > 3), high_drop = drop(own$value > 3)))
    for (point in 1:5) put(paste0(ids[i], ".point_", point), sum(own$value == point))
  }
}
