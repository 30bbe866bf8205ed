# Fixture stability.json, base R only: Rscript make_stability.R > stability.json
# Splits by refitting lm.fit on both sides of every date; recursive residuals from their definition; several breaks by
# trying every pair and triple of dates on a short series.
num <- function(x) paste0("[", paste(ifelse(is.finite(x), format(x, digits = 17, trim = TRUE, scientific = TRUE), "null"), collapse = ","), "]")
one <- function(x) ifelse(is.finite(x), format(x, digits = 17, scientific = TRUE), "null")
obj <- function(...) { a <- list(...); paste0("{", paste0('"', names(a), '":', unlist(a), collapse = ","), "}") }
rss <- function(X, y) sum(lm.fit(X, y)$residuals^2)

case <- function(y, X, at) {
  n <- length(y); k <- ncol(X)
  side <- max(k + 1, ceiling(0.15 * n)); dates <- side:(n - side); all <- rss(X, y)
  wald <- sapply(dates, function(d) { s <- rss(X[1:d, , drop = FALSE], y[1:d]) + rss(X[(d + 1):n, , drop = FALSE], y[(d + 1):n]); (all - s) / s * (n - 2 * k) })
  w <- sapply((k + 1):n, function(r) { i <- 1:(r - 1); x <- X[r, ]; A <- X[i, , drop = FALSE]
    (y[r] - sum(x * solve(crossprod(A), crossprod(A, y[i])))) / sqrt(1 + drop(x %*% solve(crossprod(A), x))) })
  s <- rss(X[1:at, , drop = FALSE], y[1:at]) + rss(X[(at + 1):n, , drop = FALSE], y[(at + 1):n])
  F <- (all - s) / k / (s / (n - 2 * k))
  r1 <- n - 2; s1 <- rss(X[1:r1, , drop = FALSE], y[1:r1]); P <- (all - s1) / 2 / (s1 / (r1 - k))
  m <- n - k; W <- cumsum(w) / sqrt(sum(w^2) / m)
  half <- lm.fit(X[1:(n %/% 2), , drop = FALSE], y[1:(n %/% 2)])
  obj(y = num(y), X = paste0("[", paste(apply(X, 2, num), collapse = ","), "]"), dates = num(dates), wald = num(wald), recursive = num(w),
      at = at, chow = one(F), chowP = one(pf(F, k, n - 2 * k, lower.tail = FALSE)),
      predictive = one(P), predictiveP = one(pf(P, 2, r1 - k, lower.tail = FALSE)),
      cusum = one(max(abs(W) / (sqrt(m) + 2 * (1:m) / sqrt(m)))), squares = one(max(abs(cumsum(w^2) / sum(w^2) - (1:m) / m))),
      half = n %/% 2, coefficients = num(half$coefficients))
}
flow <- as.numeric(Nile); nile <- case(flow, matrix(1, 100, 1), 28)
S <- as.data.frame(Seatbelts)
seat <- case(log(S$drivers), cbind(1, log(S$kms), log(S$PetrolPrice)), 64)

# best partitions of a short series by exhaustive search, parts of at least 6 rows
y <- flow[1:40]; X <- cbind(1, (1:40) %% 5); n <- 40; h <- 6
part <- function(cuts) { b <- c(0, cuts, n); sum(sapply(seq_along(b)[-1], function(i) rss(X[(b[i - 1] + 1):b[i], ], y[(b[i - 1] + 1):b[i]]))) }
best <- function(list) { v <- sapply(list, part); i <- which.min(v); c(list[[i]], v[i]) }
ok <- function(c) all(diff(c(0, c, n)) >= h)
all1 <- as.list(1:(n - 1)); all2 <- combn(n - 1, 2, simplify = FALSE); all3 <- combn(n - 1, 3, simplify = FALSE)
pick <- function(l) best(Filter(ok, l))
cat(obj(made = '"make_stability.R, base R 4.2.2"', nile = nile, seatbelts = seat,
        several = obj(y = num(y), x = num(X[, 2]), shortest = h, one = num(pick(all1)), two = num(pick(all2)), three = num(pick(all3)))), "\n")
