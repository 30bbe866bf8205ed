# Fixture for the tests of dependence, base R only: Rscript make_dependence.R > dependence.json
# Statistics are computed from their definitions with lm(), Box.test(), acf(), pacf(), fft() and ks.test(); gaps by
# putting the residuals on a complete calendar with NA where a period is missing.
options(digits = 17)
num <- function(x) paste0("[", paste(ifelse(is.finite(x), format(x, digits = 17, trim = TRUE, scientific = TRUE), "null"), collapse = ","), "]")
one <- function(x) format(x, digits = 17, scientific = TRUE)
obj <- function(...) { a <- list(...); paste0("{", paste0('"', names(a), '":', unlist(a), collapse = ","), "}") }

earlier <- function(e, periods, j) { at <- match(periods - j, periods); v <- e[at]; v[is.na(v)] <- 0; v }

bg <- function(e, X, periods, lags) {
  Z <- sapply(lags, function(j) earlier(e, periods, j))
  s <- length(lags); n <- length(e); k <- ncol(X)
  rss <- sum(lm.fit(cbind(X, Z), e)$residuals^2); rss0 <- sum(e^2)
  F <- (rss0 - rss) / s / (rss / (n - k - s)); LM <- n * (1 - rss / rss0)
  obj(F = one(F), pF = one(pf(F, s, n - k - s, lower.tail = FALSE)), LM = one(LM), pLM = one(pchisq(LM, s, lower.tail = FALSE)))
}
robust <- function(e, X, periods, lags) {
  Z <- sapply(lags, function(j) earlier(e, periods, j))
  xi <- lm.fit(X, Z)$residuals * e
  if (length(lags) == 1) xi <- matrix(xi, ncol = 1)
  LM <- length(e) - sum(lm.fit(xi, rep(1, length(e)))$residuals^2)
  obj(LM = one(LM), p = one(pchisq(LM, length(lags), lower.tail = FALSE)))
}
# Cumby-Huizinga, lags q+1..q+s, equal weights up to q
ch <- function(e, X, periods, q, s) {
  Z <- sapply(q + 1:s, function(j) earlier(e, periods, j))
  xi <- matrix(lm.fit(X, Z)$residuals * e, ncol = s)
  S <- crossprod(xi)
  if (q > 0) for (h in 1:q) {
    past <- sapply(1:s, function(i) earlier(xi[, i], periods, h))
    G <- crossprod(xi, matrix(past, ncol = s)); S <- S + G + t(G)
  }
  g <- colSums(xi); stat <- drop(g %*% solve(S, g))
  obj(statistic = one(stat), p = one(pchisq(stat, s, lower.tail = FALSE)), positive = ifelse(min(eigen(S, TRUE)$values) > 0, "true", "false"))
}
runs <- function(e) {
  s <- sign(e[e != 0]); r <- 1 + sum(diff(s) != 0); n1 <- sum(s > 0); n2 <- sum(s < 0); n <- n1 + n2
  z <- (r - 1 - 2 * n1 * n2 / n) / sqrt(2 * n1 * n2 * (2 * n1 * n2 - n) / (n^2 * (n - 1)))
  obj(count = r, z = one(z), p = one(2 * pnorm(-abs(z))))
}
cpg <- function(e) {
  n <- floor((length(e) - 1) / 2); I <- Mod(fft(e)[2:(n + 1)])^2
  C <- (cumsum(I) / sum(I))[-n]
  k <- ks.test(C, "punif", exact = TRUE)
  obj(statistic = one(unname(k$statistic)), p = one(k$p.value), share = num(C[1:5]))
}
uneven <- function(e, periods, lags) num(sapply(lags, function(j) sqrt(sum(e^2 * earlier(e, periods, j)^2)) / sum(e^2)))

case <- function(y, X, periods, orders, q) {
  e <- lm.fit(X, y)$residuals; n <- length(e); full <- max(periods) - min(periods) + 1 == n
  parts <- list(y = num(y), X = paste0("[", paste(apply(X, 2, num), collapse = ","), "]"), periods = num(periods))
  grid <- rep(NA_real_, max(periods) - min(periods) + 1); grid[periods - min(periods) + 1] <- e
  lagged <- function(j) { a <- grid[(1 + j):length(grid)]; b <- grid[1:(length(grid) - j)]; c(sum(a * b, na.rm = TRUE), sum(!is.na(a * b))) }
  parts$pairs <- num(sapply(1:20, function(j) lagged(j)[2])); parts$products <- num(sapply(1:20, function(j) lagged(j)[1] / sum(e^2)))
  parts$bg <- paste0("[", paste(sapply(orders, function(p) bg(e, X, periods, 1:p)), collapse = ","), "]")
  parts$seasonal <- bg(e, X, periods, 12)
  parts$robust <- paste0("[", paste(sapply(orders, function(p) robust(e, X, periods, 1:p)), collapse = ","), "]")
  parts$ch <- paste0("[", paste(sapply(orders, function(p) ch(e, X, periods, q, p)), collapse = ","), "]")
  parts$runs <- runs(e); parts$uneven <- uneven(e, periods, 1:20)
  d <- diff(e)[diff(periods) == 1]; parts$dw <- one(sum(d^2) / sum(e^2))
  if (full) {
    a <- acf(e, 20, plot = FALSE, demean = FALSE)$acf[-1]; parts$acf <- num(a)
    parts$pacf <- num(ARMAacf_pacf(a))
    parts$lb <- num(sapply(orders, function(p) Box.test(e, p, "Ljung")$statistic)); parts$bp <- num(sapply(orders, function(p) Box.test(e, p)$statistic))
    parts$periodogram <- cpg(e)
  }
  do.call(obj, parts)
}
# partial autocorrelations by solving the Yule-Walker equations order by order
ARMAacf_pacf <- function(r) sapply(seq_along(r), function(p) solve(toeplitz(c(1, r)[1:p]), r[1:p])[p])

S <- as.data.frame(Seatbelts)
seat <- case(log(S$drivers), cbind(1, log(S$kms), log(S$PetrolPrice), S$law), 1:192, c(1, 4, 12), 2)
flow <- as.numeric(Nile); year <- 1871:1970
keep <- !(year %in% c(1890:1895, 1930))
gaps <- case(flow[keep], cbind(1, as.numeric(year[keep] >= 1899)), year[keep], c(1, 4, 12), 1)
step <- case(flow, cbind(1, as.numeric(year >= 1899)), year, c(1, 4, 12), 1)
huron <- case(as.numeric(LakeHuron), cbind(1, 1875:1972 - 1920), 1875:1972, c(1, 4, 12), 1)
cat(obj(made = '"make_dependence.R, base R 4.2.2"', orders = "[1,4,12]", seatbelts = seat, nileGaps = gaps, nileStep = step, lakeHuron = huron), "\n")
