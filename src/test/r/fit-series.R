# Makes the seeded random series of src/test/resources/reference/fit-series.csv:
#   Rscript src/test/r/fit-series.R > src/test/resources/reference/fit-series.csv
# Odd shapes on purpose: 3 to 12 points, repeated x, tiny units, large offsets, falling and noisy lines,
# bends, a far point. Numbers are rounded to 12 digits, so that every reader sees the same ones.
set.seed(20250115)
cat("# Random series for the comparison of the fit with R; made by src/test/r/fit-series.R\n")
cat("# ", R.version.string, ", set.seed(20250115)\n", sep = "")
cat("series,x,y\n")
shapes <- c("plain", "repeated", "tiny", "offset", "noisy", "falling", "bent", "far", "uneven", "huge")
for (k in 1:44) {
  shape <- shapes[(k - 1) %% length(shapes) + 1]
  n <- if (k <= 10) c(3, 6, 5, 7, 8, 4, 9, 10, 12, 11)[k] else sample(3:12, 1)
  if (shape == "repeated") n <- max(n, 5)
  x <- switch(shape,
    repeated = sort(rep(c(0, 1, 2, 3), length.out = n)),
    uneven = c(0, cumsum(rexp(n - 1, 1))),
    seq(0, by = 1, length.out = n))
  native <- runif(1, 0.5, 4)
  noise <- if (shape == "noisy") 0.8 else 0.02
  y <- native + x + rnorm(n, 0, noise * native)
  if (shape == "bent") y <- y - 0.03 * x^2
  if (shape == "far") y[sample(n, 1)] <- y[1] * 1.6
  if (shape == "falling") y <- 20 - y
  if (shape == "tiny") { x <- x * 1e-9; y <- y * 1e-9 }
  if (shape == "huge") { x <- x * 1e9; y <- y * 1e7 }
  if (shape == "offset") { x <- x + 1000; y <- y + 50000 }
  for (i in seq_len(n)) cat(sprintf("s%02d-%s,%.12g,%.12g\n", k, shape, x[i], y[i]), sep = "")
}
