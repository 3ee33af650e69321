# What the figures of slopes draw (test/engine/figure/reference.test.ts), computed by R: groups' lines with intervals, the difference along a
# modifier with pointwise and simultaneous (Potthoff) bands, differences by level, residuals of added-variable plots, kernel densities.
#   Rscript test/reference/make-figure.R        from the project's folder; needs jsonlite, sandwich, MASS
suppressMessages({library(jsonlite); library(sandwich); library(MASS)})
exact <- function(x) ifelse(is.na(x), NA, sprintf("%.17g", x))
birth <- birthwt; birth$smoke <- factor(birth$smoke); birth$race <- factor(birth$race)
mt <- mtcars; mt$am <- factor(mt$am); an <- anorexia; an$Treat <- relevel(factor(an$Treat), "Cont")
covariance <- function(m, kind) if (kind == "classical") vcov(m) else vcovHC(m, type = kind)
# the mean row of the model matrix with one exposure level and one value of the modifier: the mean outcome over the others as they are
meanRow <- function(m, d, set) { for (v in names(set)) d[[v]] <- if (is.factor(d[[v]])) factor(set[[v]], levels(d[[v]])) else set[[v]]
  colMeans(model.matrix(delete.response(terms(m)), d, xlev = m$xlevels)) }
along <- function(name, file, plan, d, f, exposure, modifier, at, kind, q = 1, w = NULL) {
  d$.w <- if (is.null(w)) rep(1, nrow(d)) else d[[w]]; m <- lm(f, d, weights = .w); V <- covariance(m, kind); b <- coef(m); df <- df.residual(m)
  row <- function(g, x) meanRow(m, d, setNames(list(g, x), c(exposure, modifier)))
  said <- function(L, crit) { e <- sum(L * b); s <- sqrt(drop(t(L) %*% V %*% L)); list(estimate = exact(e), standardError = exact(s), low = exact(e - crit * s), high = exact(e + crit * s)) }
  tt <- qt(.975, df); ss <- sqrt((1 + q) * qf(.95, 1 + q, df)); g <- levels(d[[exposure]])
  lines <- lapply(g, function(l) list(group = l, at = lapply(at, function(x) said(row(l, x), tt))))
  # for classical errors and numeric covariates the lines are those of predict() at the means
  others <- setdiff(all.vars(f)[-1], c(exposure, modifier))
  if (kind == "classical") for (l in g) { new <- data.frame(factor(rep(l, length(at)), g), at); names(new) <- c(exposure, modifier); for (o in others) new[[o]] <- mean(d[[o]])
    p <- predict(m, new, interval = "confidence"); mine <- do.call(rbind, lapply(lines[[match(l, g)]]$at, function(s) as.numeric(c(s$estimate, s$low, s$high)))); stopifnot(max(abs(p - mine)) < 1e-9) }
  differences <- lapply(g[-1], function(l) list(level = l, at = lapply(at, function(x) { L <- row(l, x) - row(g[1], x); list(pointwise = said(L, tt), simultaneous = said(L, ss)) })))
  list(name = name, file = file, plan = plan, at = exact(at), lines = lines, differences = differences)
}
plan <- function(outcome, exposure, reference, set, modifier, kind, form = NULL) list(outcome = list(column = outcome), exposure = list(column = exposure, reference = reference),
  covariates = lapply(set, function(v) if (v == modifier && !is.null(form)) list(column = v, form = form) else if (v == "race") list(column = v, form = "category") else list(column = v)), sets = I(list(I(set))), modifiers = I(modifier), variance = kind)
cases <- list(
  along("mtcars by weight, power averaged over, classical", "mtcars.csv", plan("mpg", "am", 0, c("wt", "hp"), "wt", "classical"), mt, mpg ~ hp + am * wt, "am", "wt", c(1.513, 2, 3, 4, 5.424), "classical"),
  along("births by age, race averaged over, HC3", "birthwt.csv", plan("bwt", "smoke", 0, c("age", "race", "lwt"), "age", "HC3"), birth, bwt ~ race + lwt + smoke * age, "smoke", "age", c(14, 20, 30, 45), "HC3"),
  along("anorexia, three groups, classical", "anorexia.csv", plan("Postwt", "Treat", "Cont", "Prewt", "Prewt", "classical"), an, Postwt ~ Treat * Prewt, "Treat", "Prewt", c(70, 75, 80, 94.9), "classical"),
  along("mtcars by the logarithm of power, HC3", "mtcars.csv", plan("mpg", "am", 0, "hp", "hp", "HC3", "log"), mt, mpg ~ am * log(hp), "am", "hp", c(52, 335), "HC3"),
  along("mtcars by a curve in weight, HC2", "mtcars.csv", plan("mpg", "am", 0, "wt", "wt", "HC2", list(polynomial = 2)), mt, mpg ~ am * (wt + I(wt^2)), "am", "wt", c(1.513, 2, 3, 4, 5.424), "HC2", q = 2),
  along("births by age, weighted, HC3", "birthwt.csv", c(plan("bwt", "smoke", 0, c("age", "race"), "age", "HC3"), list(weights = "lwt")), birth, bwt ~ race + smoke * age, "smoke", "age", c(14, 20, 30, 45), "HC3", w = "lwt"))
# an amount: its slope along the modifier, and the residuals whose slope is the table's
sw <- lm(Fertility ~ Examination + Education * Catholic, swiss); V <- vcovHC(sw, type = "HC3"); df <- df.residual(sw); i <- c("Education", "Education:Catholic")
amount <- list(at = exact(c(2.15, 10, 50, 100)), differences = lapply(c(2.15, 10, 50, 100), function(x) { L <- 10 * c(1, x); e <- sum(L * coef(sw)[i]); s <- sqrt(drop(t(L) %*% V[i, i] %*% L)); tt <- qt(.975, df); ss <- sqrt(2 * qf(.95, 2, df))
  list(pointwise = list(estimate = exact(e), standardError = exact(s), low = exact(e - tt * s), high = exact(e + tt * s)), simultaneous = list(low = exact(e - ss * s), high = exact(e + ss * s))) }))
one <- lm(Fertility ~ Education + Catholic + Examination, swiss)
added <- list(x = exact(unname(resid(lm(Education ~ Catholic + Examination, swiss)))), y = exact(unname(resid(lm(Fertility ~ Catholic + Examination, swiss)))), slope = exact(coef(one)[["Education"]]))
# differences by level of a category, others held
by <- lm(bwt ~ lwt + smoke * race, birth); V <- vcovHC(by, type = "HC3"); tt <- qt(.975, df.residual(by))
levels3 <- lapply(c("1", "2", "3"), function(r) { n <- c("smoke1", if (r != "1") paste0("smoke1:race", r)); e <- sum(coef(by)[n]); s <- sqrt(sum(V[n, n])); list(level = r, estimate = exact(e), standardError = exact(s), low = exact(e - tt * s), high = exact(e + tt * s)) })
# densities: the kernel summed over the rows themselves, scaled to the highest of both groups
x <- seq(min(birth$age), max(birth$age), length.out = 64)
raw <- lapply(c("0", "1"), function(l) { v <- birth$age[birth$smoke == l]; h <- bw.nrd0(v); sapply(x, function(c) mean(dnorm(c, v, h))) }); top <- max(unlist(raw))
writeLines(toJSON(list(madeBy = list(R = R.version.string, sandwich = as.character(packageVersion("sandwich"))),
  calls = "lm; vcov / vcovHC; predict(interval = 'confidence'); model.matrix; resid; qt, qf; bw.nrd0, dnorm", cases = cases, amount = amount, added = added, byLevel = levels3,
  density = list(x = exact(x), heights = lapply(raw, function(h) exact(h / top)))), auto_unbox = TRUE, pretty = 1), "test/reference/expected/figure.json")
