# Second opinion for the numbers library. Run by hand: Rscript tests/reference/numbers/second-opinion.R
# (Debian: r-base-core, r-cran-survival). Writes second-opinion.ts beside itself, with the versions used.
suppressMessages(library(survival))
args <- commandArgs(trailingOnly = FALSE)
here <- dirname(sub("--file=", "", args[grep("--file=", args)]))
num <- function(x) ifelse(is.finite(x), sprintf("%.17g", x), "null")
vec <- function(x) paste0("[", paste(num(x), collapse = ", "), "]")
rows <- function(x) paste0("[\n", paste0("    ", apply(x, 1, vec), collapse = ",\n"), ",\n  ]")
out <- c()
add <- function(name, text) out <<- c(out, sprintf("  %s: %s,", name, text))

# Two rates: count, frames of the first; count, frames of the second; ratio, low, high, two-sided, lower, higher p.
cases <- rbind(c(11, 800, 21, 3011), c(3, 1000, 10, 2000), c(0, 500, 5, 700), c(12, 900, 2, 1000), c(40, 30000, 22, 28000),
               c(7, 1000, 7, 1000), c(250, 40000, 310, 41000), c(1, 10, 900, 8000), c(5, 300, 0, 900))
two <- t(apply(cases, 1, function(k) {
  x <- c(k[1], k[3]); t <- c(k[2], k[4])
  e <- poisson.test(x, t)
  c(k, e$estimate, e$conf.int, e$p.value, poisson.test(x, t, alternative = "less")$p.value, poisson.test(x, t, alternative = "greater")$p.value)
}))
add("twoRates", rows(two))

# Funnel counts: mean, p, limit.
grid <- expand.grid(E = c(0.2, 1, 2, 5, 10, 20, 50, 100, 731.5), p = c(0.001, 0.025, 0.975, 0.999))
r <- qpois(grid$p, grid$E)
add("funnelCounts", rows(cbind(grid$E, grid$p, r - (ppois(r, grid$E) - grid$p) / dpois(r, grid$E))))

# Gamma–Poisson maximum likelihood: counts, exposures; shape, mean, log likelihood.
counts <- c(5, 1, 5, 14, 3, 19, 1, 1, 4, 22)
exposures <- c(94.32, 15.72, 62.88, 125.76, 5.24, 31.44, 1.048, 1.048, 2.096, 10.48)
ll <- function(q) -sum(dnbinom(counts, size = exp(q[1]), mu = exp(q[2]) * exposures, log = TRUE))
fit <- optim(c(0, 0), ll, method = "BFGS", control = list(reltol = 1e-16, maxit = 1000))
grad <- function(q, h = 1e-5) sapply(1:2, function(i) { e <- c(0, 0); e[i] <- h; (ll(q + e) - ll(q - e)) / (2 * h) })
hess <- optimHess(fit$par, ll)
q <- fit$par; for (i in 1:5) q <- q - solve(hess, grad(q))
add("pumps", sprintf("{ counts: %s, exposures: %s, shape: %s, mean: %s, logLikelihood: %s }", vec(counts), vec(exposures), num(exp(q[1])), num(exp(q[2])), num(-ll(q))))
a <- exp(q[1]); b <- a / exp(q[2])
add("pumpRates", rows(cbind((a + counts) / (b + exposures), qgamma(0.025, a + counts, b + exposures), qgamma(0.975, a + counts, b + exposures))))

# Kaplan–Meier with log–log limits: time, survival, standard error, low, high. Nelson–Aalen: time, hazard, standard error.
week <- c(6, 6, 6, -6, 7, -9, 10, -10, -11, 13, 16, -17, -19, -20, 22, 23, -25, -32, -32, -34, -35)
d <- Surv(abs(week), week > 0)
km <- summary(survfit(d ~ 1, conf.type = "log-log"))
add("kaplanMeier", rows(cbind(km$time, km$surv, km$std.err, km$lower, km$upper)))
na <- survfit(d ~ 1, ctype = 1); keep <- na$n.event > 0
add("nelsonAalen", rows(cbind(na$time[keep], na$cumhaz[keep], na$std.chaz[keep])))

# Weibull with right censoring: shape, scale, log likelihood, limits of shape and of scale at 95 %.
weib <- function(t, s) {
  f <- survreg(Surv(t, s) ~ 1, dist = "weibull", control = survreg.control(rel.tolerance = 1e-15, maxiter = 200))
  v <- vcov(f); z <- qnorm(0.975); k <- 1 / f$scale; eta <- exp(coef(f))
  c(k, eta, f$loglik[1], k * exp(-z * sqrt(v[2, 2])), k * exp(z * sqrt(v[2, 2])), eta * exp(-z * sqrt(v[1, 1])), eta * exp(z * sqrt(v[1, 1])))
}
air <- c(90, 10, 60, 186, 61, 49, 14, 24, 56, 20, 79, 84, 44, 59, 29, 118, 25, 156, 310, 76, 26, 44, 23, 62, 130, 208, 70, 101, 208)
add("weibullRemission", vec(weib(abs(week), week > 0)))
add("weibullPlane7909", vec(weib(air, rep(TRUE, length(air)))))

# Best replacement age for shape 2.5, scale 1000, planned 40, failure 200; shape 3, scale 500, 10 and 15.
best <- function(k, eta, cp, cf) {
  cost <- function(a) (cp * exp(-(a / eta)^k) + cf * (1 - exp(-(a / eta)^k))) / integrate(function(u) exp(-(u / eta)^k), 0, a, rel.tol = 1e-12)$value
  o <- optimize(cost, c(eta / 100, eta * 5), tol = 1e-10); c(k, eta, cp, cf, o$minimum, o$objective)
}
add("replacement", rows(rbind(best(2.5, 1000, 40, 200), best(3, 500, 10, 15))))

# Kendall: exact upper and lower tail of concordant pairs for intervals without ties (plane 8044).
x <- c(487, 18, 100, 7, 98, 5, 85, 91, 43, 230, 3, 130)
k <- cor.test(seq_along(x), x, method = "kendall", exact = TRUE, alternative = "greater")
l <- cor.test(seq_along(x), x, method = "kendall", exact = TRUE, alternative = "less")
add("kendall", sprintf("{ intervals: %s, concordant: %s, greater: %s, less: %s }", vec(x), num(unname(k$statistic)), num(k$p.value), num(l$p.value)))

# Quantiles, definition 7: p, value.
values <- c(3.1, 9.7, 0.4, 12.5, 7.7, 7.7, 2.2, 30.9, 5, 6.1, 4.4)
ps <- c(0, 0.1, 0.25, 1 / 3, 0.5, 0.9, 0.95, 1)
add("quantiles", sprintf("{ values: %s, at: %s }", vec(values), rows(cbind(ps, quantile(values, ps, type = 7)))))

# Digamma: x, value.
xs <- c(1e-3, 0.1, 0.5, 1, 1.5, 7, 11.9, 12, 100, 1e6)
add("digamma", rows(cbind(xs, digamma(xs))))

# Large arguments. Gamma: shape, x, lower, upper tail. Quantiles: p, shape, value. Poisson: k, mean, cdf. Limits: count, low, high at 95 %.
shape <- rep(c(150, 990, 1063.919, 1119.5, 2161, 5000, 12345.6, 30000), each = 7); x <- shape + rep(c(-5, -1.5, -0.3, 0, 0.4, 1.5, 5), 8) * sqrt(shape)
add("largeGamma", rows(cbind(shape, x, pgamma(x, shape), pgamma(x, shape, lower.tail = FALSE))))
g <- expand.grid(p = c(1e-6, 0.001, 0.025, 0.4, 0.975, 0.999), a = c(799, 801, 1050, 2200, 9000, 40000))
add("largeQuantiles", rows(cbind(g$p, g$a, qgamma(g$p, g$a))))
k <- c(1058, 1116, 940, 1500, 3000, 9800); m <- c(1010.958, 1067.882, 1001, 1520.5, 3100, 10000)
add("largePoisson", rows(cbind(k, m, ppois(k, m))))
q <- expand.grid(p = c(0.001, 0.025, 0.975, 0.999), m = c(790, 810, 999, 1500.5, 20000))
add("largePoissonQuantiles", rows(cbind(q$p, q$m, qpois(q$p, q$m))))
n <- c(500, 999, 1063, 2161, 5000, 20000)
add("largeLimits", rows(t(sapply(n, function(i) c(i, poisson.test(i)$conf.int)))))

writeLines(c("/** Results of another program, stored with its version; written by second-opinion.R, not by hand. */",
  "export const secondOpinion = {",
  sprintf("  versions: 'R %s, survival %s',", paste(R.version$major, R.version$minor, sep = "."), packageVersion("survival")),
  out, "};"), file.path(here, "second-opinion.ts"))
