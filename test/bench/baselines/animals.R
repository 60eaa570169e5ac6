# What a practitioner would write in R for runs with weather and whole animals: arrays over replicates, patches and classes, and R's own
# samplers; a multinomial is drawn by binomials one after the other, since R's own takes one set of trials at a time.
#   animals.R NUMBERS REPLICATES SEED: animals at the end a line, then seconds of processor time
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
ways <- given$ways; ends <- given$ends + 1; chances <- given$chances

began <- proc.time()[1]
n <- over(given$start)
for (year in 1:years) {
  weather <- array(matrix(rnorm(R * P), R, P) %*% t(factor), c(R, P, C))
  lives <- survival * scale / (1 + exp(-a - b * weather))
  lives[, , 1] <- lives[, , 1] / (1 + crowding * rowSums(n, dims = 2))
  n <- array(rbinom(length(n), n, lives), dim(n))
  leavers <- array(rbinom(length(n), n, leaving), dim(n))
  n <- n - leavers
  for (p in 1:P) {
    left <- leavers[, p, ]
    rest <- 1
    for (way in (ways[p] + 1):ways[p + 1]) {
      arrived <- matrix(rbinom(length(left), left, min(1, chances[way] / rest)), R, C)
      n[, ends[way], ] <- n[, ends[way], ] + arrived
      left <- left - arrived
      rest <- rest - chances[way]
    }
  }
  n[, , C] <- n[, , C] + n[, , C - 1]
  n[, , 2:(C - 1)] <- n[, , 1:(C - 2)]
  old <- 3:C
  n[, , 1] <- rowSums(array(rpois(R * P * length(old), births[, , old] * n[, , old]), c(R, P, length(old))), dims = 2)
}
seconds <- proc.time()[1] - began
writeLines(as.character(rowSums(n)))
cat("seconds", seconds, "\n")
