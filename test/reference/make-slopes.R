# What stands in place of a number where slopes differ (test/reference/slopes.test.ts), computed by R from vcov alone:
# differences at the 10th, 50th and 90th percentile, the crossing with Fieller's interval, the ends of the regions.
#   Rscript test/reference/make-slopes.R        from the project's folder; needs jsonlite, sandwich, MASS
suppressMessages({library(jsonlite); library(sandwich); library(MASS)})
exact <- function(x) ifelse(is.na(x), NA, sprintf("%.17g", x))
roots <- function(A, B, C) { r <- polyroot(c(C, B, A)); if (max(abs(Im(r))) > 1e-6 * max(abs(r))) NULL else sort(Re(r)) }

case <- function(name, file, d, outcome, exposure, modifier, others, kind, plan) {
  f <- as.formula(paste(outcome, "~", paste(c(others, paste0(exposure, "*", modifier)), collapse = " + ")))
  m <- lm(f, d); V <- if (kind == "classical") vcov(m) else vcovHC(m, type = kind)
  b <- coef(m); df <- df.residual(m); tt <- qt(0.975, df)^2; ss <- 2 * qf(0.95, 2, df); z <- d[[modifier]]
  per_level <- lapply(levels(d[[exposure]])[-1], function(l) {
    g <- paste0(exposure, l); x <- paste0(exposure, l, ":", modifier); if (!x %in% names(b)) x <- paste0(modifier, ":", exposure, l)
    v <- c(V[g, g], V[g, x], V[x, x]); at <- quantile(z, c(.1, .5, .9), type = 7)
    profiles <- lapply(at, function(p) { e <- b[[g]] + b[[x]] * p; s <- sqrt(v[1] + 2 * p * v[2] + p^2 * v[3]); list(at = exact(p), estimate = exact(e), standardError = exact(s)) })
    quad <- function(c2) roots(b[[x]]^2 - c2 * v[3], 2 * (b[[g]] * b[[x]] - c2 * v[2]), b[[g]]^2 - c2 * v[1])
    fie <- quad(tt); A <- b[[x]]^2 - tt * v[3]
    rng <- c(max(tapply(z, d[[exposure]], min)), min(tapply(z, d[[exposure]], max)))
    list(level = l, profiles = unname(profiles), crossing = exact(-b[[g]] / b[[x]]),
         kind = if (is.null(fie)) "everywhere" else if (A > 0) "between" else "outside",
         fieller = I(if (is.null(fie)) character(0) else exact(fie)), simultaneous = I({ r <- quad(ss); if (is.null(r)) character(0) else exact(r) }), shared = exact(rng))
  })
  # D across the central range: the largest change of any contrast, 90 %
  C <- quantile(z, c(.1, .9), type = 7); rng <- c(max(tapply(z, d[[exposure]], min)), min(tapply(z, d[[exposure]], max)))
  C <- c(max(C[1], rng[1]), min(C[2], rng[2]))
  ix <- grep(":", names(b), value = TRUE, fixed = TRUE); D <- b[ix] * diff(C); s <- sqrt(diag(V)[ix]) * diff(C); k <- which.max(abs(D)); q <- qt(.95, df)
  list(name = name, file = file, plan = plan, contrasts = per_level, change = list(from = exact(C[1]), to = exact(C[2]), estimate = exact(D[[k]]), low = exact(D[[k]] - q * s[[k]]), high = exact(D[[k]] + q * s[[k]])))
}
pg <- read.csv("test/reference/data/penguins.csv", na.strings = ""); pg <- pg[complete.cases(pg[c("body_mass", "species", "flipper", "sex")]), ]
pg$species <- relevel(factor(pg$species), "Adelie"); pg$sex <- relevel(factor(pg$sex), "FEMALE")
mt <- mtcars; mt$am <- factor(mt$am); an <- anorexia; an$Treat <- relevel(factor(an$Treat), "Cont")
plan <- function(outcome, exposure, reference, set, modifier, kind) list(outcome = list(column = outcome), exposure = list(column = exposure, reference = reference), covariates = lapply(set, function(v) list(column = v)), sets = I(list(I(set))), modifiers = I(modifier), variance = kind, slopesAlpha = 0.999999)
cases <- list(
  case("mtcars by weight, classical", "mtcars.csv", mt, "mpg", "am", "wt", character(0), "classical", plan("mpg", "am", 0, "wt", "wt", "classical")),
  case("mtcars by weight, power held, HC3", "mtcars.csv", mt, "mpg", "am", "wt", "hp", "HC3", plan("mpg", "am", 0, c("wt", "hp"), "wt", "HC3")),
  case("mtcars by power, slopes nearly equal", "mtcars.csv", mt, "mpg", "am", "hp", character(0), "HC3", plan("mpg", "am", 0, "hp", "hp", "HC3")),
  case("mtcars by quarter mile", "mtcars.csv", mt, "mpg", "am", "qsec", character(0), "HC2", plan("mpg", "am", 0, "qsec", "qsec", "HC2")),
  case("anorexia by weight before", "anorexia.csv", an, "Postwt", "Treat", "Prewt", character(0), "HC3", plan("Postwt", "Treat", "Cont", "Prewt", "Prewt", "HC3")),
  case("penguins by flipper, three species, sex held", "penguins.csv", pg, "body_mass", "species", "flipper", "sex", "HC3", plan("body_mass", "species", "Adelie", c("sex", "flipper"), "flipper", "HC3")),
  case("penguins by flipper, two sexes, classical", "penguins.csv", pg, "body_mass", "sex", "flipper", character(0), "classical", plan("body_mass", "sex", "FEMALE", "flipper", "flipper", "classical")))
writeLines(toJSON(list(madeBy = list(R = R.version.string, sandwich = as.character(packageVersion("sandwich"))),
  calls = "lm; vcov / vcovHC; qt, qf; polyroot on (a + b x)^2 - c (vaa + 2 x vab + x^2 vbb)", cases = cases), auto_unbox = TRUE, pretty = 1), "test/reference/expected/slopes.json")
