# What a practitioner would write in R for the path without chance: set by set, matrices over patches and classes.   path.R NUMBERS SETS
words <- commandArgs(trailingOnly = TRUE)
lines <- readLines(words[1])
given <- list()
for (i in seq(1, length(lines), 2)) given[[strsplit(lines[i], " ")[[1]][1]]] <- as.numeric(strsplit(lines[i + 1], " ")[[1]])
P <- given$shape[1]; C <- given$shape[2]; years <- given$shape[3]
less <- function(s, step) 1 - 0.001 * ((s * step) %% 100)
table <- function(x) matrix(x, P, C, byrow = TRUE)
one <- matrix(0, P, P)
for (p in 1:P) {
  here <- (given$ways[p] + 1):given$ways[p + 1]
  one[given$ends[here] + 1, p] <- given$chances[here]
}
leaving <- table(given$leaving)[, 1]

began <- proc.time()[1]
totals <- numeric(as.integer(words[2]))
for (s in seq_along(totals) - 1) {
  lives <- table(given$survival) * less(s, 3)
  births <- table(given$births) * less(s, 7)
  moves <- one * less(s, 11)
  n <- table(given$start)
  for (year in 1:years) {
    crowded <- 1 + given$crowding * rowSums(n)
    n <- n * lives
    n[, 1] <- n[, 1] / crowded
    leavers <- n[, 1] * leaving
    n[, 1] <- n[, 1] - leavers + moves %*% leavers
    n <- cbind(0, n[, 1:(C - 2)], n[, C - 1] + n[, C])
    n[, 1] <- rowSums(births * n)
  }
  totals[s + 1] <- sum(n)
}
seconds <- proc.time()[1] - began
writeLines(format(totals, digits = 15))
cat("seconds", seconds, "\n")
