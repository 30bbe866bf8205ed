# Fixture integration.json, base R only: Rscript make_integration.R > integration.json
# Unit-root regressions by lm(), lag choice on the common sample by logLik(); PP.test() of stats; KPSS from its definition.
num <- function(x) paste0("[", paste(format(x, digits = 17, trim = TRUE, scientific = TRUE), collapse = ","), "]")
one <- function(x) format(x, digits = 17, scientific = TRUE)
obj <- function(...) { a <- list(...); paste0("{", paste0('"', names(a), '":', unlist(a), collapse = ","), "}") }
adf <- function(y, det, p, skip = p) {
  d <- diff(y); n <- length(d); t <- (skip + 1):n
  M <- data.frame(d = d[t], level = y[t]); if (p > 0) for (i in 1:p) M[[paste0("l", i)]] <- d[t - i]
  if (det == "trend") M$time <- seq_along(t)
  lm(if (det == "none") d ~ . - 1 else d ~ ., M)
}
tau <- function(m) summary(m)$coefficients["level", "t value"]
choose <- function(y, det) {
  f <- c(none = 1, constant = 2, trend = 3)[det]
  top <- min(floor(12 * (length(y) / 100)^0.25), floor((length(y) - 2 - 2 * f) / 3)); m <- lapply(0:top, function(p) adf(y, det, p, top))
  last <- function(p) abs(summary(m[[p + 1]])$coefficients[paste0("l", p), "t value"])
  down <- 0; for (p in top:1) if (last(p) > 1.645) { down <- p; break }
  c(which.min(sapply(m, AIC)) - 1, which.min(sapply(m, BIC)) - 1, down)
}
lrv <- function(e, l) { n <- length(e); g <- sapply(0:l, function(j) sum(e[(1 + j):n] * e[1:(n - j)]) / n); g[1] + 2 * sum((1 - (1:l) / (l + 1)) * g[-1]) }
kpss <- function(y, trend, l) { t <- seq_along(y); e <- residuals(if (trend) lm(y ~ t) else lm(y ~ 1)); sum(cumsum(e)^2) / length(y)^2 / lrv(e, l) }
pp <- function(y, det, l) {
  n <- length(y) - 1; a <- y[-1]; b <- y[-(n + 1)]; t <- seq_len(n)
  m <- summary(if (det == "trend") lm(a ~ t + b) else lm(a ~ b)); e <- residuals(m); g <- sum(e^2) / n; L <- lrv(e, l)
  se <- m$coefficients["b", 2]; sqrt(g / L) * (m$coefficients["b", 1] - 1) / se - (L - g) / 2 / sqrt(L) * n * se / m$sigma
}
case <- function(y) obj(y = num(y),
  none = num(sapply(c(0, 1, 4), function(p) tau(adf(y, "none", p)))), constant = num(sapply(c(0, 1, 4), function(p) tau(adf(y, "constant", p)))),
  trend = num(sapply(c(0, 1, 4), function(p) tau(adf(y, "trend", p)))), chosenConstant = num(choose(y, "constant")), chosenTrend = num(choose(y, "trend")),
  kpss = num(c(kpss(y, FALSE, 3), kpss(y, FALSE, 11), kpss(y, TRUE, 3), kpss(y, TRUE, 11))), pp = num(c(pp(y, "constant", 3), pp(y, "trend", 3))),
  stats = one(unname(PP.test(y, lshort = TRUE)$statistic)), statsLags = unname(PP.test(y, lshort = TRUE)$parameter))
gas <- log(as.numeric(UKgas)); S <- as.data.frame(Seatbelts); kms <- log(S$kms); drivers <- log(S$drivers)
eg <- residuals(lm(drivers ~ kms + log(S$PetrolPrice)))
cat(obj(made = '"make_integration.R, base R 4.2.2"', lakeHuron = case(as.numeric(LakeHuron)), nile = case(as.numeric(Nile)), gas = case(gas), kms = case(kms),
  pair = obj(y = num(drivers), x = num(kms), z = num(log(S$PetrolPrice)), tau = num(sapply(c(0, 2), function(p) tau(adf(eg, "none", p)))))), "\n")
