# What a practitioner would write in R for mean animals under weather: arrays over replicates, patches and classes.
#   courses.R NUMBERS REPLICATES SEED: animals at the end a line, then seconds of processor time
words <- commandArgs(trailingOnly = TRUE)
lines <- readLines(words[1])
given <- list()
for (i in seq(1, length(lines), 2)) given[[strsplit(lines[i], " ")[[1]][1]]] <- as.numeric(strsplit(lines[i + 1], " ")[[1]])
R <- as.integer(words[2])
set.seed(as.integer(words[3]))
P <- given$shape[1]; C <- given$shape[2]; years <- given$shape[3]
over <- function(x) aperm(array(rep(array(x, c(C, P)), R), c(C, P, R)), c(3, 2, 1))
survival <- over(given$survival)
births <- over(given$births)
leaving <- over(given$leaving)
crowding <- matrix(given$crowding, R, P, byrow = TRUE)
factor <- matrix(0, P, P)
starts <- given$`factor-start`
for (p in 1:P) {
  here <- (starts[p] + 1):starts[p + 1]
  factor[p, given$`factor-column`[here] + 1] <- given$`factor-weight`[here]
}
tables <- array(given$distributions, c(4, P, C))
spread <- function(k) aperm(array(rep(tables[k, , ], R), c(P, C, R)), c(3, 1, 2))
a <- spread(2); b <- spread(3); scale <- spread(4)
one <- matrix(0, P, P)
for (p in 1:P) {
  here <- (given$ways[p] + 1):given$ways[p + 1]
  one[p, given$ends[here] + 1] <- given$chances[here]
}

began <- proc.time()[1]
n <- over(given$start)
for (year in 1:years) {
  weather <- array(matrix(rnorm(R * P), R, P) %*% t(factor), c(R, P, C))
  lives <- survival * scale / (1 + exp(-a - b * weather))
  lives[, , 1] <- lives[, , 1] / (1 + crowding * rowSums(n, dims = 2))
  n <- n * lives
  leavers <- n * leaving
  n <- n - leavers
  for (c in 1:C) n[, , c] <- n[, , c] + leavers[, , c] %*% one
  n[, , C] <- n[, , C] + n[, , C - 1]
  n[, , 2:(C - 1)] <- n[, , 1:(C - 2)]
  old <- 3:C
  n[, , 1] <- rowSums(births[, , old] * n[, , old], dims = 2)
}
seconds <- proc.time()[1] - began
writeLines(format(rowSums(n), digits = 15))
cat("seconds", seconds, "\n")
