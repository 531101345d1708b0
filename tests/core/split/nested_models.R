# SPDX-License-Identifier: GPL-3.0-or-later
# Figures for tst_variance_split: nested models on unbalanced.csv (invented readings with gaps; set point 8 has no falling ones).
# Run: Rscript nested_models.R > nested_models.txt
d <- read.csv("unbalanced.csv")
options(contrasts = c("contr.treatment", "contr.poly"))
show <- function(case, name, value) cat(case, name, sprintf("%.15g", value), "\n")

rss <- function(y, X, w) {
    q <- qr(X * sqrt(w), tol = 1e-10)
    list(ss = sum(qr.resid(q, y * sqrt(w))^2), rank = q$rank)
}

# X: columns of the function at the references, Xn: at the set points.
chain <- function(case, d, X, Xn, w) {
    n <- nrow(d)
    e <- qr.resid(qr(X * sqrt(w)), d$indication * sqrt(w)) / sqrt(w)
    sp <- model.matrix(~ 0 + factor(d$set_point))
    both <- names(which(tapply(d$direction, d$set_point, function(v) length(unique(v))) == 2))
    D <- sapply(both, function(s) ifelse(d$set_point != as.numeric(s), 0, ifelse(d$direction == "rising", .5, -.5)))
    r <- factor(d$run); contrasts(r) <- contr.sum(3)
    R <- model.matrix(~ r)[, -1]
    G <- R * (d$set_point - 5)
    s2 <- rss(e, sp, w); s3 <- rss(e, cbind(sp, D), w); s4 <- rss(e, cbind(sp, D, R), w); s5 <- rss(e, cbind(sp, D, R, G), w)
    s1 <- sum(w * e^2); p <- ncol(X)
    ms <- s5$ss / (n - s5$rank)
    line <- function(name, ss, df) {
        show(case, paste0(name, ".ss"), ss); show(case, paste0(name, ".df"), df)
        show(case, paste0(name, ".f"), ss / df / ms); show(case, paste0(name, ".p"), pf(ss / df / ms, df, n - s5$rank, lower.tail = FALSE))
    }
    show(case, "residual.ss", s1)
    line("lack_of_fit", s1 - s2$ss, s2$rank - p)
    line("hysteresis", s2$ss - s3$ss, s3$rank - s2$rank)
    line("run_offset", s3$ss - s4$ss, s4$rank - s3$rank)
    line("run_slope", s4$ss - s5$ss, s5$rank - s4$rank)
    show(case, "repeatability.ss", s5$ss); show(case, "repeatability.df", n - s5$rank)
    show(case, "pure_error.ss", s2$ss); show(case, "pure_error.df", n - s2$rank)
    naive <- ((s1 - s2$ss) / (s2$rank - p)) / (s2$ss / (n - s2$rank))
    show(case, "naive.f", naive); show(case, "naive.p", pf(naive, s2$rank - p, n - s2$rank, lower.tail = FALSE))
    a <- rss(e, cbind(Xn, D, R, G), w)
    line("adjusted", a$ss - s5$ss, s5$rank - a$rank)
}

powers <- function(x, degree) outer(x - 5, 0:degree, `^`)
polynomial <- function(case, d, x, degree, w) chain(case, d, powers(x, degree), powers(d$set_point, degree), w)
polynomial("line", d, d$reference, 1, rep(1, nrow(d)))
polynomial("nominal_quadratic", d, d$set_point, 2, rep(1, nrow(d)))
polynomial("weighted_quadratic", d, d$reference, 2, 1 / d$u^2)

# With the readings 5, 17, 18 and 40 excluded, and weights.
left <- d[-c(5, 17, 18, 40), ]
polynomial("excluded_weighted_quadratic", left, left$reference, 2, 1 / left$u^2)

# A function that is linear in its coefficients and no polynomial: b0 + b1 sqrt(x), without set point 0.
above <- d[d$set_point > 0, ]
root <- function(x) cbind(1, sqrt(x))
chain("square_root", above, root(above$reference), root(above$set_point), rep(1, nrow(above)))

# Where the reference is the set point itself, the same from the readings by lm and anova.
f <- factor(d$set_point); r <- factor(d$run); cell <- interaction(f, d$direction, drop = TRUE)
m1 <- lm(indication ~ poly(set_point, 2), d); m2 <- lm(indication ~ f, d); m3 <- lm(indication ~ cell, d)
m4 <- lm(indication ~ cell + r, d); m5 <- lm(indication ~ cell + r + r:set_point, d)
show("anova", "lack_of_fit.ss", deviance(m1) - deviance(m2))
show("anova", "hysteresis.ss", deviance(m2) - deviance(m3))
show("anova", "run_offset.ss", deviance(m3) - deviance(m4))
show("anova", "run_slope.ss", deviance(m4) - deviance(m5))
show("anova", "repeatability.df", df.residual(m5))
