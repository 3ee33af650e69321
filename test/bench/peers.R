# Every set, or a sample of them, with lm.fit and HC3 of the exposure from its QR: Rscript peers.R FILE K SETS; prints JSON.
args <- commandArgs(TRUE)
k <- as.integer(args[2]); sets <- as.integer(args[3])
started <- proc.time()[["elapsed"]]
data <- if (requireNamespace("data.table", quietly = TRUE)) as.data.frame(data.table::fread(args[1])) else read.csv(args[1])
x <- paste0("x", seq_len(k))
data <- data[complete.cases(data[c("y", "d", x)]), ]
read <- proc.time()[["elapsed"]] - started
design <- cbind(1, as.matrix(data[c("d", x)])); storage.mode(design) <- "double"
which <- unique(round(seq(0, 2^k - 1, length.out = sets)))
hc3 <- function(set) {
  columns <- c(1, 2, 2 + which(bitwAnd(set, 2^(seq_len(k) - 1)) > 0))
  fit <- lm.fit(design[, columns, drop = FALSE], data$y)
  q <- qr.Q(fit$qr); h <- rowSums(q^2)
  along <- q %*% backsolve(qr.R(fit$qr), diag(length(columns)))[order(fit$qr$pivot)[2], ]
  sqrt(sum((along * fit$residuals / (1 - h))^2))
}
fitting <- proc.time()[["elapsed"]]
errors <- vapply(which, hc3, 0)
done <- proc.time()[["elapsed"]]
cat(sprintf('{"read": %f, "perSet": %f, "sets": %d, "first": %.15g}', 1000 * read, 1000 * (done - fitting) / length(which),
            length(which), errors[1]))
