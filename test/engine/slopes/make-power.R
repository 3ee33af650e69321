# How often a difference in slopes is found where there is one (test/engine/slopes/rate.test.ts): the power of the F test of the interaction,
# from the noncentral F distribution, on the fixed rows of that test. The binomial ranges of the rates are R's too.
#   Rscript test/engine/slopes/make-power.R        from the project's folder; needs jsonlite
library(jsonlite)
n <- 120; runs <- 2000; i <- 0:(n - 1)
x <- ((37 * i) %% n) / n * 4 - 2; g <- as.numeric((53 * i + (x > 0) * 20) %% n < 60)
X <- cbind(1, g, x, g * x); v <- solve(crossprod(X))[4, 4]; df <- n - 4
power <- function(slope) pf(qf(.95, 1, df), 1, df, ncp = slope^2 / v, lower.tail = FALSE)
range99 <- function(p) qbinom(c(.005, .995), runs, p) / runs
slopes <- c(0.25, 0.5)
writeLines(toJSON(list(madeBy = R.version.string, runs = runs, parallel = range99(.05),
  differ = lapply(slopes, function(s) list(slope = s, power = power(s), range = range99(power(s))))), auto_unbox = TRUE, digits = 10, pretty = TRUE),
  "test/engine/slopes/power.json")
