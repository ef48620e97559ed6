# The further numbers by a second road:
#   Rscript src/test/r/numbers.R src/test/resources/reference/numbers-series.csv > src/test/resources/reference/numbers-r.csv
# electrodes by nls, their profile by lm and uniroot; groups by oneway.test (Welch); levels by anova
# of lm; slopes by lm with pt; lines through the origin by lm; repeated medians by outer.
data <- read.csv(commandArgs(trailingOnly = TRUE)[1], comment.char = "#")
cat("# By nls, lm, anova, oneway.test, uniroot, qt, qf; made by src/test/r/numbers.R\n")
cat("# ", R.version.string, "\n", sep = "")
cat("set,quantity,value\n")

electrode <- function(d, put) {
  V0 <- 50; Vx <- 25
  decades <- function(C) log10((C * Vx + d$a) / (V0 + d$b))
  S0 <- if (coef(lm(d$c ~ d$a))[2] < 0) -57.8 else 28.7
  n <- nrow(d); df <- n - if (n > 3) 3 else 2
  sse <- function(C) {
    L <- decades(C)
    if (n > 3) sum(resid(lm(d$c ~ L))^2) else sum((d$c - S0 * L - mean(d$c - S0 * L))^2)
  }
  C0 <- exp(optimize(function(p) sse(exp(p)), log(c(0.02, 200)), tol = 1e-12)$minimum)
  # optimize finds half of the digits; the root of the derivative has all
  slide <- function(p) {
    C <- exp(p); L <- decades(C)
    S <- if (n > 3) coef(lm(d$c ~ L))[[2]] else S0
    r <- d$c - S * L
    sum((r - mean(r)) * C * Vx / (C * Vx + d$a)) * S
  }
  C0 <- exp(uniroot(slide, log(C0) + c(-0.01, 0.01), tol = 1e-15)$root)
  L0 <- decades(C0)
  start <- if (n > 3) list(E0 = coef(lm(d$c ~ L0))[[1]], S = coef(lm(d$c ~ L0))[[2]], C = C0)
           else list(E0 = mean(d$c - S0 * L0), C = C0)
  # The start is the minimum already; one step that rounding turns back is no failure.
  control <- nls.control(tol = 1e-9, maxiter = 200, warnOnly = TRUE)
  # with derivatives written out: nls takes them numerically otherwise, at the cost of digits
  free <- deriv(~ E0 + S * log((C * Vx + a) / (V0 + b)) / log(10), c("E0", "S", "C"),
                function(E0, S, C, a, b, Vx, V0) {})
  fixed <- deriv(~ E0 + S0 * log((C * Vx + a) / (V0 + b)) / log(10), c("E0", "C"),
                 function(E0, C, a, b, S0, Vx, V0) {})
  fit <- if (n > 3) nls(c ~ free(E0, S, C, a, b, Vx, V0), d, start, control)
         else nls(c ~ fixed(E0, C, a, b, S0, Vx, V0), d, start, control)
  co <- summary(fit)$coefficients
  C <- co["C", 1]; s <- summary(fit)$sigma
  put("C", C); put("se_C", co["C", 2]); put("E0", co["E0", 1]); put("s", s)
  if (n > 3) { put("S", co["S", 1]); put("se_S", co["S", 2]) }
  rise <- function(p) (sse(exp(p)) - deviance(fit)) / s^2 - qt(0.975, df)^2
  low <- log(C) - log(1e6); high <- log(C) + log(1e6)
  # At the far end the added amounts round away and the rank falls: the last sum that is one counts.
  end <- function(from, to) {
    p <- seq(from, to, length.out = 20001)
    r <- sapply(p[seq(1, 20001, by = 20)], rise)
    i <- which(r > 0)[1]
    if (is.na(i)) return(NA)
    grid <- p[seq(1, 20001, by = 20)]
    uniroot(rise, sort(grid[c(i - 1, i)]), tol = 1e-13)$root
  }
  lo <- end(log(C), low); hi <- end(log(C), high)
  if (!is.na(lo)) put("lower", exp(lo))
  if (!is.na(hi)) put("upper", exp(hi))
}
group <- function(d, put) {
  test <- oneway.test(b ~ a, d)
  put("p", test$p.value)
  w <- 1 / tapply(d$b, d$a, function(v) var(v) / length(v))
  m <- tapply(d$b, d$a, mean)
  put("mean", weighted.mean(m, w))
  put("chi2", sum(w * (m - weighted.mean(m, w))^2))
  # the group with the largest part in the sum of squares for its size
  ss <- tapply(d$b, d$a, function(v) sum((v - mean(v))^2))
  nu <- table(d$a) - 1
  p <- pmin(1, length(ss) * pbeta(ss / sum(ss), nu / 2, (sum(nu) - nu) / 2, lower.tail = FALSE))
  i <- which.min(p)
  put("cochran_index", i); put("cochran_c", (ss / sum(ss))[i]); put("cochran_p", p[i])
  v <- d$b; n <- length(v)
  G <- max(abs(v - mean(v))) / sd(v)
  t <- sqrt(n * (n - 2) * G^2 / ((n - 1)^2 - n * G^2))
  put("grubbs_g", G); put("grubbs_p", min(1, 2 * n * pt(-t, n - 2)))
  q <- qt(1 - 0.05 / (2 * n), n - 2)
  put("grubbs_critical", (n - 1) / sqrt(n) * sqrt(q^2 / (n - 2 + q^2)))
}
levels_of <- function(d, put) {
  test <- anova(lm(b ~ a, d), lm(b ~ factor(a), d))
  put("F", test$F[2]); put("p", test$`Pr(>F)`[2])
  slope <- outer(d$b, d$b, "-") / outer(d$a, d$a, "-")
  slope[outer(d$a, d$a, "==")] <- NA
  b <- median(apply(slope, 1, median, na.rm = TRUE))
  put("rm_slope", b); put("rm_intercept", median(d$b - b * d$a))
  origin <- summary(lm(b ~ a - 1, d))
  put("o_slope", origin$coefficients[1, 1]); put("o_se", origin$coefficients[1, 2])
  put("o_s", origin$sigma); put("o_r2", origin$r.squared)
}
slopes <- function(d, put) {
  one <- summary(lm(c ~ b, d[d$a == 1, ]))$coefficients[2, 1:2]
  two <- summary(lm(c ~ b, d[d$a == 2, ]))$coefficients[2, 1:2]
  test <- function(m) {
    v <- c(one[2]^2, m^2 * two[2]^2)
    list(t = (one[1] - m * two[1]) / sqrt(sum(v)), df = sum(v)^2 / sum(v^2 / 3))
  }
  lo <- test(0.9); hi <- test(1.1)
  put("p", max(pt(lo$t, lo$df, lower.tail = FALSE), pt(hi$t, hi$df)))
  r <- one[1] / two[1]
  put("ratio", r)
  tt <- qt(0.975, test(r)$df)
  A <- two[1]^2 - tt^2 * two[2]^2; B <- -2 * one[1] * two[1]; C <- one[1]^2 - tt^2 * one[2]^2
  if (A > 0) {
    put("lower", (-B - sqrt(B^2 - 4 * A * C)) / (2 * A))
    put("upper", (-B + sqrt(B^2 - 4 * A * C)) / (2 * A))
  }
}
for (id in unique(data$set)) {
  d <- data[data$set == id, ]
  put <- function(name, value) cat(sprintf("%s,%s,%.17g\n", id, name, value), sep = "")
  switch(d$kind[1], electrode = electrode(d, put), group = group(d, put),
         levels = levels_of(d, put), slopes = slopes(d, put))
}
