# Makes hypergeometric.csv, sizes.csv and bounds.csv with the hypergeometric distribution of R 4.2.2 (phyper):
#   Rscript hypergeometric.R
# x of n files drawn from `population`, of which `faulty` are faulty.
set.seed(20261201)
rows <- do.call(rbind, lapply(1:400, function(i) {
  population <- sample(c(5, 20, 60, 104, 250, 999, 5000, 100000), 1)
  faulty <- sample(0:min(population, 400), 1)
  n <- sample(1:min(population, 500), 1)
  found <- sample(0:min(n, faulty, 12), 1)
  data.frame(population, faulty, n, found)
}))
rows$chance <- sprintf("%.12e", phyper(rows$found, rows$faulty, rows$population - rows$faulty, rows$n))
write.csv(unique(rows), "hypergeometric.csv", row.names = FALSE, quote = FALSE)

# The smallest n for which phyper(expect, too_many, population - too_many, n) <= 1 - confidence.
sizes <- expand.grid(population = c(1, 2, 10, 20, 37, 78, 104, 300, 1000, 10000, 100000), tolerable = c(0, 1, 2, 5, 10, 20), confidence = c(80, 90, 95, 99), expect = 0:2)
sizes$too_many <- floor(sizes$tolerable * sizes$population / 100 + 1e-9) + 1
sizes <- sizes[sizes$expect < sizes$too_many, ]
sizes$n <- mapply(function(N, D, c, conf) {
  low <- 1; high <- N
  while (low < high) {
    mid <- (low + high) %/% 2
    if (phyper(c, D, N - D, mid) <= 1 - conf / 100 + 1e-12) high <- mid else low <- mid + 1
  }
  low
}, sizes$population, sizes$too_many, sizes$expect, sizes$confidence)
write.csv(sizes, "sizes.csv", row.names = FALSE, quote = FALSE)

# The largest D for which phyper(found, D, population - D, n) > 1 - confidence.
bounds <- do.call(rbind, lapply(1:300, function(i) {
  population <- sample(c(3, 20, 60, 104, 500, 3000), 1)
  n <- sample(1:min(population, 300), 1)
  found <- sample(0:min(n, 8), 1)
  data.frame(population, n, found, confidence = sample(c(80, 90, 95, 99), 1))
}))
bounds$at_most <- mapply(function(N, n, k, conf) {
  D <- k:(N - n + k)
  max(D[phyper(k, D, N - D, n) > 1 - conf / 100 + 1e-12])
}, bounds$population, bounds$n, bounds$found, bounds$confidence)
write.csv(unique(bounds), "bounds.csv", row.names = FALSE, quote = FALSE)
