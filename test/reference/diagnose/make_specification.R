# Fixture specification.json, base R only: Rscript make_specification.R > specification.json
# Case influence from lm.influence(), cooks.distance(), rstudent(), dfbetas(); blocks and Goldfeld-Quandt by refitting;
# variance inflation by auxiliary regressions; condition indices by svd(); quantile bands by qbeta().
num <- function(x) paste0("[", paste(ifelse(is.finite(x), format(x, digits = 17, trim = TRUE, scientific = TRUE), "null"), collapse = ","), "]")
one <- function(x) ifelse(is.finite(x), format(x, digits = 17, scientific = TRUE), "null")
rows <- function(M) paste0("[", paste(apply(M, 1, num), collapse = ","), "]")
obj <- function(...) { a <- list(...); paste0("{", paste0('"', names(a), '":', unlist(a), collapse = ","), "}") }

case <- function(y, X, block, drop) {
  n <- length(y); k <- ncol(X); m <- lm(y ~ X - 1); e <- residuals(m)
  each <- (n - n %/% 5) %/% 2
  side <- function(i) { f <- lm.fit(X[i, , drop = FALSE], y[i]); c(sum(f$residuals^2), length(i) - f$rank) }
  a <- side(1:each); b <- side((n - each + 1):n); gq <- (b[1] / b[2]) / (a[1] / a[2])
  without <- t(sapply(1:(n - block + 1), function(f) lm.fit(X[-(f:(f + block - 1)), , drop = FALSE], y[-(f:(f + block - 1))])$coefficients))
  vif <- sapply(2:k, function(j) 1 / (1 - summary(lm(X[, j] ~ X[, -c(1, j)]))$r.squared))
  S <- svd(scale(X, center = FALSE, scale = sqrt(colSums(X^2))))
  phi <- S$v^2 %*% diag(1 / S$d^2); prop <- t(phi / rowSums(phi))
  z <- sort(e / (summary(m)$sigma * sqrt(1 - hatvalues(m))))
  # White with every square and product, R deciding the rank
  Z <- X; for (i in 2:k) for (j in i:k) Z <- cbind(Z, X[, i] * X[, j])
  w <- lm(e^2 ~ Z)
  obj(y = num(y), X = paste0("[", paste(apply(X, 2, num), collapse = ","), "]"),
      hat = num(hatvalues(m)), cook = num(cooks.distance(m)), studentised = num(rstudent(m)), dfbetas = rows(unname(dfbetas(m))),
      gq = one(gq), gqdf = num(c(b[2], a[2])), gqp = one(2 * min(pf(gq, b[2], a[2]), pf(gq, b[2], a[2], lower.tail = FALSE))),
      block = block, without = rows(unname(without)), vif = num(vif), indices = num(S$d[1] / S$d), proportions = rows(prop),
      quantileLow = num(qnorm(qbeta(0.025, 1:n, n:1))), quantileHigh = num(qnorm(qbeta(0.975, 1:n, n:1))), ordered = num(z),
      white = one(n * summary(w)$r.squared), whiteDf = w$rank - 1)
}
S <- as.data.frame(Seatbelts)
seat <- case(log(S$drivers), cbind(1, log(S$kms), log(S$PetrolPrice), S$law), 12)
L <- longley
lo <- case(L$Employed, cbind(1, as.matrix(L[, 1:6])), 3)
cat(obj(made = '"make_specification.R, base R 4.2.2"', seatbelts = seat, longley = lo), "\n")
