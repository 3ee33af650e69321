# Expected values for whole comparisons (test/reference/compare.test.ts), made by R on open data.
#   Rscript test/reference/make-compare.R        from the project's folder
# Needs jsonlite, sandwich, clubSandwich and MASS (Debian: r-cran-jsonlite r-cran-sandwich r-cran-clubsandwich r-cran-mass),
# and test/reference/data/penguins.csv (test/reference/make-penguins.mjs writes it from the npm package vega-datasets).
suppressMessages({library(jsonlite); library(sandwich); library(clubSandwich); library(MASS)})
here <- "test/reference"
minus <- "−"
exact <- function(x) ifelse(is.na(x), NA, sprintf("%.17g", x))

write_data <- function(d, name) {
  for (j in seq_along(d)) if (is.factor(d[[j]])) d[[j]] <- as.character(d[[j]])
  text <- d
  for (j in seq_along(d)) if (is.numeric(d[[j]])) text[[j]] <- ifelse(is.na(d[[j]]), "", sprintf("%.15g", d[[j]]))
  write.table(text, file.path(here, "data", name), sep = ",", quote = FALSE, row.names = FALSE, na = "")
}

covariance <- function(m, kind, cluster) switch(kind,
  classical = vcov(m), HC0 = , HC1 = , HC2 = , HC3 = vcovHC(m, type = kind),
  CR1 = vcovCL(m, cluster = cluster, type = "HC1", cadjust = TRUE),
  CR2 = vcovCR(m, cluster = cluster, type = "CR2"))

# METHODS 4, from its definition: the rows' (clusters') influence on one coefficient.
influence_on <- function(m, name, kind, cluster, V) {
  X <- model.matrix(m); w <- if (is.null(m$weights)) rep(1, nrow(X)) else m$weights
  XtWXi <- solve(crossprod(X * sqrt(w)))
  e <- residuals(m); g <- XtWXi[name, ]
  if (kind == "CR1") return(rowsum(drop(X %*% g) * w * e, cluster)[, 1])
  if (kind == "CR2") {
    A <- attr(V, "adjustments"); js <- split(seq_len(nrow(X)), cluster)
    return(sapply(seq_along(js), function(j) { i <- js[[j]]; sum((t(g) %*% t(X[i, , drop = FALSE]) %*% diag(w[i], length(i))) %*% A[[j]] %*% e[i]) }))
  }
  h <- w * rowSums((X %*% XtWXi) * X)
  drop(X %*% g) * w * e / (1 - h)
}

case <- function(name, file, d, plan, outcome, exposure, sets, terms = list(), kind, cluster = NULL, weights = NULL, level = 0.95, modifiers = character(0), classical_call = "") {
  term <- function(v) if (!is.null(terms[[v]])) terms[[v]] else v
  used <- unique(c(outcome, exposure, unlist(sets), modifiers, cluster, weights))
  common <- d[complete.cases(d[, used]), ]
  cl <- if (is.null(cluster)) NULL else factor(common[[cluster]])
  common$.w <- if (is.null(weights)) 1 else common[[weights]]
  fit <- function(rhs) {
    f <- as.formula(paste(outcome, "~", paste(rhs, collapse = " + ")))
    if (is.null(weights)) lm(f, common) else lm(f, common, weights = .w)
  }
  grp <- is.factor(common[[exposure]])
  coefs <- if (grp) paste0(exposure, levels(common[[exposure]])[-1]) else exposure
  labels <- if (grp) paste(levels(common[[exposure]])[-1], minus, levels(common[[exposure]])[1]) else paste("per 1", exposure)
  test_df <- function(m, V, co) if (kind == "CR2") coef_test(m, V, test = "Satterthwaite")[co, "df_Satt"] else if (kind == "CR1") nlevels(cl) - 1 else df.residual(m)
  wald <- function(m, V, idx) {
    b <- coef(m)[idx]
    if (kind == "CR2") {
      if (length(idx) == 1) { df <- test_df(m, V, idx); t2 <- b^2 / V[idx, idx]; return(c(t2, 1, df, 2 * pt(-sqrt(t2), df))) }
      C <- matrix(0, length(idx), length(coef(m))); for (i in seq_along(idx)) C[i, match(idx[i], names(coef(m)))] <- 1
      r <- Wald_test(m, constraints = C, vcov = V, test = "HTZ"); return(c(r$Fstat, r$df_num, r$df_denom, r$p_val))
    }
    q <- length(idx); f <- drop(t(b) %*% solve(V[idx, idx], b)) / q
    df2 <- if (kind == "CR1") nlevels(cl) - 1 else df.residual(m)
    c(f, q, df2, pf(f, q, df2, lower.tail = FALSE))
  }
  base <- fit(exposure); V0 <- covariance(base, kind, cl)
  out <- lapply(sets, function(s) {
    m <- fit(c(exposure, vapply(s, term, ""))); V <- covariance(m, kind, cl)
    contrasts <- lapply(seq_along(coefs), function(i) {
      co <- coefs[i]; b <- coef(m)[[co]]; se <- sqrt(V[co, co]); df <- test_df(m, V, co); q <- qt((1 + level) / 2, df)
      r <- list(contrast = labels[i], estimate = exact(b), standardError = exact(se), df = exact(df), low = exact(b - q * se), high = exact(b + q * se), p = exact(2 * pt(-abs(b / se), df)))
      if (length(s)) {
        psi <- influence_on(m, co, kind, cl, V) - influence_on(base, co, kind, cl, V0)
        fac <- if (kind == "CR1") nlevels(cl) / (nlevels(cl) - 1) * (nrow(common) - 1) / df.residual(m) else 1
        r$shift <- exact(b - coef(base)[[co]]); r$shiftError <- exact(sqrt(sum(psi^2) * fac))
        # Gelbach 2016, from its definition
        r$parts <- lapply(s, function(v) {
          cols <- setdiff(colnames(model.matrix(as.formula(paste("~", term(v))), common)), "(Intercept)")
          Z <- model.matrix(m)[, cols, drop = FALSE]
          gamma <- sapply(seq_along(cols), function(k) { aux <- common; aux$.z <- Z[, k]; coef(lm(as.formula(paste(".z ~", exposure)), aux, weights = aux$.w))[[co]] })
          list(covariate = v, estimate = exact(-sum(gamma * coef(m)[cols])))
        })
      }
      r
    })
    slopes <- lapply(modifiers, function(z) {
      # centred: the test is the same, and R's own rounding no longer hides the last digits
      if (is.numeric(common[[z]]) && term(z) == z) common[[z]] <- common[[z]] - mean(common[[z]])
      fit <- function(rhs) {
        f <- as.formula(paste(outcome, "~", paste(rhs, collapse = " + ")))
        if (is.null(weights)) lm(f, common) else lm(f, common, weights = .w)
      }
      rhs <- c(exposure, unique(vapply(c(s, z), term, "")), paste0(exposure, ":", term(z)))
      mi <- fit(rhs); Vi <- covariance(mi, kind, cl); idx <- grep(":", names(coef(mi)), value = TRUE, fixed = TRUE)
      w <- wald(mi, Vi, idx); list(modifier = z, statistic = exact(w[1]), df1 = exact(w[2]), df2 = exact(w[3]), p = exact(w[4]))
    })
    ps <- vapply(slopes, function(x) as.numeric(x$p), 0); hs <- p.adjust(ps, "holm")
    for (i in seq_along(slopes)) slopes[[i]]$pHolm <- exact(hs[i])
    joint <- if (length(coefs) > 1) { w <- wald(m, V, coefs); list(statistic = exact(w[1]), df1 = exact(w[2]), df2 = exact(w[3]), p = exact(w[4])) } else NULL
    list(adjustedFor = s, rows = nrow(common), residualDf = df.residual(m), contrasts = contrasts, joint = joint, slopes = slopes,
         model = list(names = names(coef(m)), estimate = exact(unname(coef(m))), standardError = exact(unname(sqrt(diag(V))))))
  })
  list(name = name, file = file, plan = plan, sets = out)
}

mt <- mtcars; mt$car <- rownames(mtcars); write_data(mt, "mtcars.csv")
write_data(iris, "iris.csv"); write_data(warpbreaks, "warpbreaks.csv"); write_data(sleep, "sleep.csv")
write_data(swiss, "swiss.csv"); write_data(airquality, "airquality.csv"); write_data(anorexia, "anorexia.csv")
write_data(infert, "infert.csv"); write_data(birthwt, "birthwt.csv")
pg <- read.csv(file.path(here, "data/penguins.csv"), na.strings = "")
mt$am <- factor(mt$am); pg$species <- factor(pg$species); pg$sex <- factor(pg$sex)
wb <- warpbreaks; wb$tension <- factor(as.character(wb$tension)); # natural order, as in the file
 sl <- sleep; sl$group <- factor(sl$group); sl$ID <- as.character(sl$ID)
bw <- birthwt; bw$smoke <- factor(bw$smoke)
an <- anorexia; an$Treat <- relevel(factor(an$Treat), "Cont")

each <- function(v) c(list(character(0)), lapply(v, c), list(v))
cov <- function(...) lapply(c(...), function(v) list(column = v))
plan <- function(outcome, exposure, covariates, variance, ...) c(list(outcome = list(column = outcome), exposure = exposure, covariates = covariates, variance = variance), list(...))
cases <- list()
for (k in c("classical", "HC0", "HC1", "HC2", "HC3"))
  cases <- c(cases, list(case(paste("mtcars", k), "mtcars.csv", mt, plan("mpg", list(column = "am", reference = 0), cov("wt", "hp", "qsec"), k), "mpg", "am", each(c("wt", "hp", "qsec")), kind = k, modifiers = c("wt", "hp", "qsec"))))
for (k in c("CR1", "CR2"))
  cases <- c(cases, list(case(paste("mtcars", k, "by carb"), "mtcars.csv", mt, plan("mpg", list(column = "am", reference = 0), cov("wt", "hp"), k, cluster = "carb"), "mpg", "am", each(c("wt", "hp")), kind = k, cluster = "carb", modifiers = c("wt", "hp"))))
for (k in c("classical", "HC3"))
  cases <- c(cases, list(case(paste("penguins", k), "penguins.csv", pg, plan("body_mass", list(column = "species", reference = "Adelie"), cov("flipper", "sex"), k), "body_mass", "species", each(c("flipper", "sex")), kind = k, modifiers = c("flipper", "sex"))))
cases <- c(cases, list(
  case("penguins CR2 by island and sex", "penguins.csv", transform(pg, cell = paste(island, sex)), plan("body_mass", list(column = "sex", reference = "FEMALE"), cov("flipper", "beak_depth"), "CR2", cluster = "island"), "body_mass", "sex", each(c("flipper", "beak_depth")), kind = "CR2", cluster = "island", modifiers = c("flipper", "beak_depth")),
  case("iris HC3, three groups", "iris.csv", iris, plan("Sepal.Length", list(column = "Species", reference = "setosa"), cov("Petal.Length", "Sepal.Width"), "HC3"), "Sepal.Length", "Species", each(c("Petal.Length", "Sepal.Width")), kind = "HC3", modifiers = c("Petal.Length", "Sepal.Width")),
  case("warpbreaks HC3, a factor modifier", "warpbreaks.csv", wb, plan("breaks", list(column = "wool", reference = "A"), cov("tension"), "HC3"), "breaks", "wool", list(character(0), "tension"), kind = "HC3", modifiers = "tension"),
  case("sleep classical", "sleep.csv", sl, plan("extra", list(column = "group", reference = 1), cov(), "classical"), "extra", "group", list(character(0)), kind = "classical"),
  case("swiss HC3, an amount", "swiss.csv", swiss, plan("Fertility", list(column = "Education"), cov("Agriculture", "Catholic", "Infant.Mortality"), "HC3"), "Fertility", "Education", each(c("Agriculture", "Catholic", "Infant.Mortality")), kind = "HC3", modifiers = c("Agriculture", "Catholic", "Infant.Mortality")),
  case("airquality HC3, missing cells", "airquality.csv", airquality, plan("Ozone", list(column = "Temp"), cov("Wind", "Solar.R"), "HC3"), "Ozone", "Temp", each(c("Wind", "Solar.R")), kind = "HC3", modifiers = c("Wind", "Solar.R")),
  case("anorexia HC3, slopes that differ", "anorexia.csv", an, plan("Postwt", list(column = "Treat", reference = "Cont"), cov("Prewt"), "HC3"), "Postwt", "Treat", list(character(0), "Prewt"), kind = "HC3", modifiers = "Prewt"),
  case("mtcars weighted HC3", "mtcars.csv", mt, plan("mpg", list(column = "am", reference = 0), cov("wt", "hp"), "HC3", weights = "qsec"), "mpg", "am", each(c("wt", "hp")), kind = "HC3", weights = "qsec", modifiers = c("wt", "hp")),
  case("mtcars weighted classical", "mtcars.csv", mt, plan("mpg", list(column = "am", reference = 0), cov("wt", "hp"), "classical", weights = "qsec"), "mpg", "am", each(c("wt", "hp")), kind = "classical", weights = "qsec", modifiers = c("wt", "hp")),
  case("mtcars weighted CR2 by carb", "mtcars.csv", mt, plan("mpg", list(column = "am", reference = 0), cov("wt", "hp"), "CR2", weights = "qsec", cluster = "carb"), "mpg", "am", each(c("wt", "hp")), kind = "CR2", weights = "qsec", cluster = "carb", modifiers = c("wt", "hp")),
  case("birthwt HC3, a coded category and a log", "birthwt.csv", bw, plan("bwt", list(column = "smoke", reference = 0), list(list(column = "race", form = "category"), list(column = "lwt", form = "log"), list(column = "age")), "HC3"), "bwt", "smoke", each(c("race", "lwt", "age")), terms = list(race = "factor(race)", lwt = "log(lwt)"), kind = "HC3", modifiers = c("race", "lwt", "age")),
  case("birthwt HC3, a cubic polynomial", "birthwt.csv", bw, plan("bwt", list(column = "smoke", reference = 0), list(list(column = "age", form = list(polynomial = 3)), list(column = "lwt")), "HC3"), "bwt", "smoke", each(c("age", "lwt")), terms = list(age = "poly(age, 3)"), kind = "HC3", modifiers = c("age", "lwt"))))

v <- function(p) as.character(packageVersion(p))
writeLines(toJSON(list(
  madeBy = list(R = R.version.string, sandwich = v("sandwich"), clubSandwich = v("clubSandwich"), MASS = v("MASS")),
  calls = "lm; vcov; sandwich::vcovHC(type); sandwich::vcovCL(type='HC1', cadjust=TRUE); clubSandwich::vcovCR('CR2'), coef_test('Satterthwaite'), Wald_test('HTZ'); p.adjust('holm')",
  cases = cases), auto_unbox = TRUE, null = "null", na = "null", pretty = 1), file.path(here, "expected", "compare.json"))
