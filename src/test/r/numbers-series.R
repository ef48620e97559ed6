# Seeded data for the comparison of the further numbers:
#   Rscript src/test/r/numbers-series.R > src/test/resources/reference/numbers-series.csv
# electrode: a added amount, b added volume, c potential in mV, 25 mL aliquot in 50 mL
# group: a group number, b value; levels: a addition, b signal; slopes: a which line, b x, c signal
cat("# Seeded data, made by src/test/r/numbers-series.R\n# ", R.version.string, "\n", sep = "")
cat("set,kind,a,b,c\n")
set.seed(20250115, kind = "Mersenne-Twister", normal.kind = "Inversion")
put <- function(set, kind, a, b, c = rep(0, length(a)))
  cat(sprintf("%s,%s,%.12g,%.12g,%.12g\n", set, kind, a, b, c), sep = "")
k <- 0
for (n in c(3, 4, 4, 5, 6, 8)) for (s in c(-57.8, 28.7)) {
  k <- k + 1
  cx <- 10^runif(1, -1, 1.5)
  v <- (0:(n - 1)) * 0.5
  amount <- v * cx * 25
  e <- runif(1, 50, 250) + s * log10((cx * 25 + amount) / (50 + v)) + rnorm(n, 0, 0.15)
  put(sprintf("e%02d", k), "electrode", amount, v, e)
}
for (k in 1:8) {
  sizes <- list(c(4, 5), c(3, 3, 8), c(6, 4, 4, 5), c(3, 12))[[(k - 1) %% 4 + 1]]
  for (g in seq_along(sizes))
    put(sprintf("g%02d", k), "group", rep(g, sizes[g]),
        14 + (k > 4) * 0.4 * g + rnorm(sizes[g], 0, runif(1, 0.2, 1)))
}
for (k in 1:6) {
  x <- list(rep(c(0, 1, 2), each = 2), rep(c(0, 1, 2, 4), c(3, 2, 1, 2)),
            c(5, 0, 5, 2.5, 0, 2.5, 10))[[(k - 1) %% 3 + 1]]
  put(sprintf("l%02d", k), "levels", x, 3 + 1.7 * x - (k > 3) * 0.05 * x^2 + rnorm(length(x), 0, 0.05))
}
for (k in 1:6) {
  x <- 0:4
  put(sprintf("s%02d", k), "slopes", rep(1:2, each = 5), c(x, x * 3),
      c(2 + 1.05 * x + rnorm(5, 0, 0.01 * 2^k), 3.0 * x + rnorm(5, 0, 0.01 * 2^k)))
}
