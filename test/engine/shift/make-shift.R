# Expected values for test/engine/shift/shift.test.ts and test/engine/design/amount.test.ts, none of them by the engine's own formula.
#   Rscript test/engine/shift/make-shift.R        from the project's folder
# Needs jsonlite, sandwich, boot (Debian: r-cran-jsonlite r-cran-sandwich r-cran-boot) and test/reference/data.
suppressMessages({library(jsonlite); library(sandwich); library(boot)})
exact <- function(x) sprintf("%.17g", x)
data <- function(name) read.csv(file.path("test/reference/data", name))

# Several regressions on the same rows as one: the models stand block by block in one lm, each row of the data is a cluster, and
# sandwich's covariance then holds the covariances between the models' coefficients. HC3 by cluster is e/(1 - h) here, since a row's
# leverages in different blocks do not mix.
stacked <- function(models, cluster, type, cadjust = FALSE) {
  X <- lapply(models, model.matrix); n <- nrow(X[[1]]); p <- sapply(X, ncol)
  big <- matrix(0, n * length(X), sum(p)); at <- 0
  for (k in seq_along(X)) { big[(k - 1) * n + seq_len(n), at + seq_len(p[k])] <- X[[k]]; at <- at + p[k] }
  colnames(big) <- unlist(lapply(seq_along(X), function(k) paste(k, colnames(X[[k]]))))
  y <- unlist(lapply(models, function(m) model.response(model.frame(m))))
  fit <- lm(y ~ big - 1); V <- vcovCL(fit, cluster = rep(cluster, length(X)), type = type, cadjust = cadjust)
  # sandwich's HC3 by cluster is the jackknife's, with (g - 1)/g clusters (meatCL, 3.0.2); the HC3 of METHODS 3 and of vcovHC has no such factor
  if (type == "HC3") { g <- length(unique(cluster)); V <- V * g / (g - 1) }
  dimnames(V) <- list(colnames(big), colnames(big)); V
}

shift_case <- function(name, file, outcome, exposure, covariates, cluster = NULL) {
  d <- data(file); rows <- seq_len(nrow(d))
  base <- lm(reformulate(exposure, outcome), d); full <- lm(reformulate(c(exposure, covariates), outcome), d)
  a <- paste(2, exposure); b <- paste(1, exposure)
  error <- function(V) sqrt(V[a, a] + V[b, b] - 2 * V[a, b])
  result <- list(name = name, file = file, outcome = outcome, exposure = exposure, covariates = covariates, cluster = cluster,
                 shift = exact(coef(full)[[exposure]] - coef(base)[[exposure]]))
  if (is.null(cluster)) {
    result$HC3 <- exact(error(stacked(list(base, full), rows, "HC3")))
    # parts, Gelbach 2016: full model and every auxiliary regression in one stack, then the delta method
    aux <- lapply(covariates, function(z) lm(reformulate(exposure, z), d))
    V <- stacked(c(list(full), aux), rows, "HC3")
    result$parts <- lapply(seq_along(covariates), function(k) {
      g <- coef(aux[[k]])[[exposure]]; beta <- coef(full)[[covariates[k]]]
      i <- paste(1, covariates[k]); j <- paste(k + 1, exposure)
      list(covariate = covariates[k], estimate = exact(-g * beta),
           error = exact(sqrt(g^2 * V[i, i] + beta^2 * V[j, j] + 2 * g * beta * V[i, j])))
    })
    # Clogg, Petkova & Haritou 1995: equal spread, covariates as if fixed; what the covariates' own sampling adds is sum beta' Var(Gamma) beta
    s <- summary(full)$sigma; s0 <- summary(base)$sigma
    clogg <- vcov(full)[exposure, exposure] - vcov(base)[exposure, exposure] * s^2 / s0^2
    E <- sapply(aux, residuals); beta <- coef(full)[covariates]
    sampling <- var(drop(E %*% beta)) * (nrow(d) - 1) / (nrow(d) - 2) * vcov(base)[exposure, exposure] / s0^2
    result$clogg <- exact(sqrt(clogg)); result$cloggAndSampling <- exact(sqrt(clogg + sampling))
    set.seed(1895)
    draws <- boot(d, function(d, i) coef(lm(reformulate(c(exposure, covariates), outcome), d[i, ]))[[exposure]] -
      coef(lm(reformulate(exposure, outcome), d[i, ]))[[exposure]], R = 8000)
    result$bootstrap <- exact(sd(draws$t))
  } else {
    # CR1: the factor is the adjusted fit's
    J <- length(unique(d[[cluster]])); n <- nrow(d)
    result$CR1 <- exact(error(stacked(list(base, full), d[[cluster]], "HC0")) * sqrt(J / (J - 1) * (n - 1) / df.residual(full)))
  }
  result
}

cases <- list(
  shift_case("birthwt by smoke", "birthwt.csv", "bwt", "smoke", c("lwt", "age", "ht")),
  shift_case("swiss by education", "swiss.csv", "Fertility", "Education", c("Agriculture", "Catholic")),
  shift_case("infert by spontaneous", "infert.csv", "case", "spontaneous", c("age", "induced", "parity")),
  shift_case("birthwt by smoke, clustered by age", "birthwt.csv", "bwt", "smoke", c("lwt", "ht"), "age"),
  shift_case("mtcars by am, clustered by carb", "mtcars.csv", "mpg", "am", c("wt", "hp"), "carb"))

# Bases: R's own polynomial, and Harrell's restricted cubic spline written out from its definition (type 7 quantiles).
rcs <- function(x, probs) {
  t <- quantile(x, probs, type = 7, names = FALSE); k <- length(t); pos <- function(u) pmax(u, 0)^3
  sapply(seq_len(k - 2), function(j) (pos(x - t[j]) - pos(x - t[k - 1]) * (t[k] - t[j]) / (t[k] - t[k - 1]) +
    pos(x - t[k]) * (t[k - 1] - t[j]) / (t[k] - t[k - 1])) / (t[k] - t[1])^2)
}
bw <- data("birthwt.csv"); percentiles <- list("3" = c(.1, .5, .9), "4" = c(.05, .35, .65, .95), "5" = c(.05, .275, .5, .725, .95))
described <- function(m) list(estimate = exact(unname(coef(m))), error = exact(unname(sqrt(diag(vcovHC(m, "HC3"))))))
forms <- c(
  lapply(names(percentiles), function(k) c(list(form = list(spline = as.integer(k))), described(lm(bwt ~ lwt + rcs(lwt, percentiles[[k]]) + smoke, bw)))),
  list(c(list(form = list(polynomial = 3L)), described(lm(bwt ~ poly(lwt, 3, raw = TRUE) + smoke, bw))),
       c(list(form = "log"), described(lm(bwt ~ log(lwt) + smoke, bw))), c(list(form = "as is"), described(lm(bwt ~ lwt + smoke, bw)))))

v <- function(p) as.character(packageVersion(p))
writeLines(toJSON(list(
  madeBy = list(R = R.version.string, sandwich = v("sandwich"), boot = v("boot")),
  calls = "sandwich::vcovCL(stacked lm, cluster = row, type = 'HC3' or 'HC0', cadjust = FALSE); boot::boot(R = 8000), set.seed(1895); sandwich::vcovHC('HC3')",
  cases = cases, forms = forms), auto_unbox = TRUE, null = "null", pretty = 1), "test/engine/shift/expected.json")
