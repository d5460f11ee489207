# One plot's effect check put together from the functions of fixtures/tables/effect-check.R, apart from the TypeScript.
# Rscript effect-check.reference.R <effect-check.R> <in.json> : a list of cases in, a list of answers out (JSON).
suppressPackageStartupMessages(library(jsonlite))
args <- commandArgs(TRUE)
# the reference file loads metafor for its pooling vectors, which are not used here
for (e in parse(args[1])) if (!any(grepl("metafor", all.names(e), fixed = TRUE))) {
  if (!(is.call(e) && identical(e[[1]], as.name("if")))) eval(e, globalenv())
}

num <- function(x) as.numeric(unlist(x))
var_of <- function(p, noise, rep) reading_var(noise$core, p$cores, rep, p$labDuplicates, noise$wobble, p$step) / p$composites

check_one <- function(x) {
  noise <- x$noise; log_scale <- identical(noise$scale, "log")
  w <- function(v) if (log_scale) log(v) else v
  rep <- sqrt(update_var(noise$rep, 8, sum(num(x$labDifferences)^2) / 2, length(num(x$labDifferences)))[["var"]])
  v0 <- function(p) var_of(p, noise, rep)
  # what duplicates and untreated plots teach, as squares over their prior variance
  ss <- 0; df <- 0
  for (d in x$fieldDuplicates) { ss <- ss + (w(d$a$value) - w(d$b$value))^2 / (v0(d$a) + v0(d$b)); df <- df + 1 }
  for (s in x$untreatedSteps) {
    ch <- sapply(s, function(p) w(p$after$value) - w(p$before$value)); vv <- mean(sapply(s, function(p) v0(p$before) + v0(p$after)))
    ss <- ss + sum((ch - mean(ch))^2) / vv; df <- df + length(ch) - 1 }
  wb <- num(lapply(x$befores, function(p) p$weight)); nC <- length(x$controls)
  vb <- function(rows, k) sum(wb^2 * sapply(rows, v0)) * k
  if (nC > 0) {
    ch <- sapply(x$controls, function(c) w(c$after$value) - sum(wb * sapply(c$befores, function(p) w(p$value))))
    vv <- mean(sapply(x$controls, function(c) v0(c$after) + vb(c$befores, 1)))
    ss <- ss + (if (nC > 1) sum((ch - mean(ch))^2) / vv else 0); df <- df + nC - 1 }
  k <- unname(update_var(1, 8, ss, df)[["var"]]); nu_v <- 8 + df
  occ <- c(noise$occasion^2, 8)
  for (s in x$occasionSteps) {
    md <- mean(sapply(s, function(p) w(p$after$value) - w(p$before$value))); v <- mean(sapply(s, function(p) k * (v0(p$before) + v0(p$after)) / 2))
    occ <- unname(update_var(sqrt(occ[1]), occ[2], max(md^2 / 2 - v / length(s), 0), 1)) }
  A <- w(x$after$value); B <- sum(wb * sapply(x$befores, function(p) w(p$value)))
  vA <- k * v0(x$after); vB <- vb(x$befores, k)
  R <- w(num(x$round)); N <- length(R); m <- mean(R); vm <- k * v0(x$befores[[which.max(wb)]])
  if (N >= 3) { t2 <- (4 * noise$spread^2 + (N - 1) * max(var(R) - vm, 0)) / (4 + N - 1); rho <- reliability(t2, vB) } else { t2 <- 0; rho <- 1 }
  Bt <- if (N >= 1) true_before(B, m, rho) else B
  if (nC > 0) {
    AC <- sapply(x$controls, function(c) w(c$after$value)); BC <- sapply(x$controls, function(c) sum(wb * sapply(c$befores, function(p) w(p$value))))
    D <- did(A, B, AC, BC, rho); dB <- B - mean(BC)
    s2 <- vA + rho * vB + mean(sapply(x$controls, function(c) k * v0(c$after) + rho * vb(c$befores, k))) / nC + dB^2 * 2 * rho^2 * (1 - rho)^2 / (4 + N - 1)
    nu <- nu_v
  } else {
    D <- A - Bt; sh <- occ[1] * (1 + sum(wb^2)); se <- (noise$season * x$seasonWeight)^2; lb <- (noise$laboratory * x$laboratoryWeight)^2
    s2 <- vA + rho * vB + sh + (if (rho < 1) (1 - rho)^2 * (t2 + vB) / N else 0) + se + lb
    v <- c(vA + vB, sh, se, lb); d <- c(nu_v, occ[2], 8, 8); nu <- satterthwaite(v[v > 0], d[v > 0])
  }
  I <- x$intended; s <- sqrt(s2)
  word <- if (log_scale) { b <- exp(Bt); verdict_log(b * exp(D), b, s, I, nu) } else verdict(D, s, I, nu)
  q <- qt(.95, nu)
  list(D = D, s = s, nu = nu, lo = D - q * s, hi = D + q * s, rho = rho, verdict = word)
}
cat(toJSON(lapply(fromJSON(args[2], simplifyVector = FALSE), check_one), auto_unbox = TRUE, digits = NA))
