# Student's t and the detection factors:
#   Rscript src/test/r/fit-t.R > src/test/resources/reference/fit-t.csv
# delta is the noncentrality at which pt(qt(0.95, df), df, ncp) is 0.05, by uniroot.
cat("# Student's t by qt and pt, detection factors by pt with a noncentrality and uniroot; made by src/test/r/fit-t.R\n")
cat("# ", R.version.string, "\n", sep = "")
cat("quantity,df,t,value\n")
for (df in c(0.75, 1:60, 1.5, 2.25, 2.7, 3.3, 4.9, 7.9, 12.4, 33.3, 100, 250.5, 1000)) {
  t <- qt(0.95, df)
  low <- t; high <- 4.5 * t + 5
  delta <- uniroot(function(d) pt(t, df, d) - 0.05, c(low, min(high, 37)), tol = 1e-13)$root
  cat(sprintf("q95,%.17g,,%.17g\n", df, t))
  cat(sprintf("q975,%.17g,,%.17g\n", df, qt(0.975, df)))
  cat(sprintf("delta,%.17g,,%.17g\n", df, delta))
}
for (df in c(0.5, 1e4, 1e5, 1e6, 2e6, 1e8, Inf)) {
  cat(sprintf("q975,%.17g,,%.17g\n", df, qt(0.975, df)))
}
for (df in c(0.5, 1, 1.5, 2, 3.7, 10, 100, 1e5, 2e6, 1e8, Inf)) {
  for (t in c(-60, -8, -2.3, -0.5, -1e-4, -1e-8, 0, 1e-9, 1e-5, 0.3, 1.7, 5)) {
    cat(sprintf("p,%.17g,%.17g,%.17g\n", df, t, pt(t, df)))
  }
}
for (d in list(c(1, 2, 1), c(3, 2.5, 4), c(1.5, 6, 3), c(7, 1.9, 3.6), c(30, 1.7, 3.4), c(120, 1.66, 3.3))) {
  cat(sprintf("pn,%.17g,%.17g;%.17g,%.17g\n", d[1], d[2], d[3], pt(d[2], d[1], d[3])))
}
