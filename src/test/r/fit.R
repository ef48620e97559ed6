# Recomputes the fit of every series by a second road:
#   Rscript src/test/r/fit.R src/test/resources/reference/fit-series.csv > src/test/resources/reference/fit-r.csv
# line by lm (QR) on centred x, delta and Fieller written out as the roots of the defining quadratic,
# quadratic term by orthogonal polynomials (poly), deleted residuals by rstudent.
series <- read.csv(commandArgs(trailingOnly = TRUE)[1], comment.char = "#")
cat("# The fit of the series of fit-series.csv, by lm, poly, rstudent, qt; made by src/test/r/fit.R\n")
cat("# ", R.version.string, "\n", sep = "")
cat("series,quantity,value\n")
for (id in unique(series$series)) {
  x <- series$x[series$series == id]
  y <- series$y[series$series == id]
  put <- function(name, value) cat(sprintf("%s,%s,%.17g\n", id, name, value), sep = "")
  n <- length(x)
  u <- x - mean(x)
  line <- lm(y ~ u)
  coefs <- summary(line)$coefficients
  b <- coefs[2, 1]; sb <- coefs[2, 2]; ybar <- coefs[1, 1]; sy <- coefs[1, 2]
  a <- ybar - b * mean(x)
  s <- summary(line)$sigma
  df <- n - 2
  t <- qt(0.975, df)
  put("a", a); put("b", b); put("s", s); put("se_b", sb)
  put("se_a", sqrt(sy^2 + mean(x)^2 * sb^2))
  put("cov_ab", -mean(x) * sb^2)
  put("r", cor(x, y))
  put("x0", a / b)
  # delta method on ybar/b, whose parts are uncorrelated
  put("se_x0", sqrt((sy / b)^2 + (ybar * sb / b^2)^2))
  g <- (t * sb / b)^2
  put("g_fieller", g)
  if (g < 1) {
    # (ybar - q b)^2 = t^2 (sy^2 + q^2 sb^2), a quadratic in q = x0 + mean(x)
    A <- b^2 - t^2 * sb^2; B <- -2 * ybar * b; C <- ybar^2 - t^2 * sy^2
    root <- sqrt(B^2 - 4 * A * C)
    put("fi_lo_x0", (-B - root) / (2 * A) - mean(x))
    put("fi_hi_x0", (-B + root) / (2 * A) - mean(x))
  }
  if (n > 3 && length(unique(x)) > 2) {
    unit <- max(abs(u))
    curve <- summary(lm(y ~ poly(u / unit, 2)))
    put("quad_t", curve$coefficients[3, 3])
    put("mandel_p", curve$coefficients[3, 4])
    put("q_s", curve$sigma)
  }
  if (n > 3) {
    deleted <- rstudent(line)
    for (i in seq_len(n)) {
      put(paste0("rstudent", i), deleted[i])
    }
  }
}
