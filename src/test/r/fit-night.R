# Priors of variances, Fisher's F and weighted fits:
#   Rscript src/test/r/fit-night.R > src/test/resources/reference/fit-night.csv
# Priors: variances s0^2 * F(nu, d0) at evenly spaced probabilities, so that no random numbers are
# needed; moments by Smyth (2004), section 6.2; likelihood by optim on the density of F.
cat("# Priors by Smyth's moments and by maximum likelihood (df, optim), pf, lm with weights; made by src/test/r/fit-night.R\n")
cat("# ", R.version.string, "\n", sep = "")
cat("quantity,a,b,c,value\n")
show <- function(quantity, a, b, c, value)
  cat(sprintf("%s,%.17g,%.17g,%.17g,%.17g\n", quantity, a, b, c, value))

trigammaInverse <- function(x) uniroot(function(y) trigamma(y) - x, c(1e-4, 1e6), tol = 1e-12)$root
for (d0 in c(3, 6, 12)) for (nu in c(1, 2, 4)) {
  s2 <- 0.7 * qf((seq_len(2000) - 0.5) / 2000, nu, d0)
  e <- log(s2) - digamma(nu / 2) + log(nu / 2)
  excess <- mean((e - mean(e))^2) * 2000 / 1999 - trigamma(nu / 2)
  half <- trigammaInverse(excess)
  show("moments_d0", d0, nu, 0.7, 2 * half)
  show("moments_s02", d0, nu, 0.7, exp(mean(e) + digamma(half) - log(half)))
  fit <- optim(c(log(6), 0), function(p)
    -sum(df(s2 / exp(p[2]), nu, exp(p[1]), log = TRUE) - p[2]),
    control = list(reltol = 1e-14, maxit = 5000))
  show("likelihood_d0", d0, nu, 0.7, exp(fit$par[1]))
  show("likelihood_s02", d0, nu, 0.7, exp(fit$par[2]))
}

for (f in c(1e-6, 0.2, 1, 3.3, 40, 1e5)) for (df1 in c(1, 2, 7)) for (df2 in c(0.8, 3, 17.5, 1e4, Inf))
  show("pf", f, df1, df2, pf(f, df1, df2, lower.tail = FALSE))

x <- c(0, 0.5, 1.25, 2, 3.5)
y <- c(1.02, 1.49, 2.31, 2.96, 4.61)
w <- c(4, 2.5, 1.5, 1, 0.4)
w <- w / mean(w)
line <- lm(y ~ x, weights = w)
s <- summary(line)
b <- coef(line)
show("w_intercept", 0, 0, 0, b[[1]])
show("w_slope", 0, 0, 0, b[[2]])
show("w_s", 0, 0, 0, s$sigma)
show("w_se_intercept", 0, 0, 0, s$coefficients[1, 2])
show("w_se_slope", 0, 0, 0, s$coefficients[2, 2])
show("w_cov", 0, 0, 0, vcov(line)[1, 2])
gradient <- c(1 / b[[2]], -b[[1]] / b[[2]]^2)
show("w_se_native", 0, 0, 0, sqrt(drop(gradient %*% vcov(line) %*% gradient)))
v <- vcov(line); q <- qt(0.975, 3)
ends <- sort(Re(polyroot(c(b[[1]]^2 - q^2 * v[1, 1], -2 * (b[[1]] * b[[2]] - q^2 * v[1, 2]), b[[2]]^2 - q^2 * v[2, 2]))))
show("w_lower", 0, 0, 0, ends[1])
show("w_upper", 0, 0, 0, ends[2])
for (i in seq_along(x)) {
  show("w_leverage", i, 0, 0, hatvalues(line)[[i]])
  show("w_rstudent", i, 0, 0, rstudent(line)[[i]])
}
curve <- summary(lm(y ~ x + I(x^2), weights = w))
show("w_c2", 0, 0, 0, curve$coefficients[3, 1])
show("w_se_c2", 0, 0, 0, curve$coefficients[3, 2])
show("w_p_bend", 0, 0, 0, curve$coefficients[3, 4])

# The bend allowance: c2 fixed to its bound, the rest fitted by lm with an offset.
plain <- summary(lm(y ~ x + I(x^2)))
bound <- plain$coefficients[3, 1] - qt(0.95, 2) * plain$coefficients[3, 2]
bent <- coef(lm(y ~ x, offset = bound * x^2))
roots <- polyroot(c(bent[[1]], bent[[2]], bound))
straight <- coef(lm(y ~ x))
near <- Re(roots[abs(Im(roots)) < 1e-9])
show("allowance", 0, 0, 0, straight[[1]] / straight[[2]] + max(near[near < 0]))
