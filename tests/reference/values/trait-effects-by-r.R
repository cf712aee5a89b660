# The trait study's regression by R's own lm(), with cell dummies written out, CR1 errors by the formula of Cameron and
# Miller (2015, eq. 11-12), and the wild cluster bootstrap refitted for every one of the 2^G signs.
#   Rscript trait-effects-by-r.R > trait-effects-by-r.json     (base R alone; run with R 4.2.2)
set.seed(20)
n <- 96
rows <- data.frame(
  season = rep(1:4, each = 24),
  designer = sample(0:35, n, TRUE),
  blades = sample(c(5, 7, 9, 11), n, TRUE),
  inlet = sample(c("none", "bellmouth", "cone"), n, TRUE),
  gap = round(runif(n, 0.3, 1.5), 2)
)
care <- rnorm(36, 0, 0.01)
rows$ratio <- round(exp(0.02 * rows$season - 0.004 * rows$blades - 0.03 * (rows$inlet == "bellmouth") +
  0.05 * rows$gap + care[rows$designer + 1] + rnorm(n, 0, 0.02)), 6)

cr1 <- function(X, e, g) {
  G <- length(unique(g)); n <- nrow(X); k <- ncol(X)
  bread <- solve(crossprod(X))
  scores <- rowsum(X * e, g)
  factor <- G / (G - 1) * (n - 1) / (n - k)
  sqrt(diag(factor * bread %*% crossprod(scores) %*% bread))
}
fit_of <- function(d) {
  d$inlet <- relevel(factor(d$inlet), ref = "none")
  fit <- lm(log(ratio) ~ blades + inlet + gap + factor(season), data = d)
  X <- model.matrix(fit)
  keep <- c("blades", "inletbellmouth", "inletcone", "gap")
  list(fit = fit, X = X, b = coef(fit)[keep], se = cr1(X, resid(fit), d$designer)[keep], keep = keep)
}
whole <- fit_of(rows)
G <- length(unique(rows$designer))
t <- whole$b / whole$se
half <- qt(0.975, G - 1) * whole$se

# Eight designers only: every sign of each, the null imposed, cells and the other traits as nuisance.
few <- rows
few$designer <- few$designer %% 8
small <- fit_of(few)
X <- small$X
y <- log(few$ratio)
wild <- sapply(small$keep, function(name) {
  j <- match(name, colnames(X))
  under <- lm.fit(X[, -j], y)
  tstar <- sapply(0:255, function(code) {
    s <- ifelse(bitwAnd(bitwShiftR(code, 0:7), 1) == 1, -1, 1)
    ys <- under$fitted.values + under$residuals * s[few$designer + 1]
    again <- lm.fit(X, ys)
    abs(again$coefficients[j]) / cr1(X, again$residuals, few$designer)[j]
  })
  seen <- abs(small$b[name] / small$se[name])
  c(mean(tstar >= seen * (1 - 1e-10)), sort(tstar)[ceiling(0.95 * 256)])
})

number <- function(x) paste0("[", paste(sprintf("%.17g", x), collapse = ", "), "]")
text <- function(x) paste0("[", paste0("\"", x, "\"", collapse = ", "), "]")
cat("{\n",
  sprintf(" \"source\": \"%s, lm() and matrices of base R; the script stands beside this file\",\n", R.version.string),
  " \"rows\": {\n",
  "  \"season\": ", number(rows$season), ",\n  \"designer\": ", number(rows$designer), ",\n",
  "  \"blades\": ", number(rows$blades), ",\n  \"inlet\": ", text(rows$inlet), ",\n",
  "  \"gap\": ", number(rows$gap), ",\n  \"ratio\": ", number(rows$ratio), "\n },\n",
  " \"designers\": ", G, ",\n \"effects\": ", text(c("blades", "inlet:bellmouth", "inlet:cone", "gap")), ",\n",
  " \"beta\": ", number(whole$b), ",\n \"cr1\": ", number(whole$se), ",\n",
  " \"low\": ", number(whole$b - half), ",\n \"high\": ", number(whole$b + half), ",\n",
  " \"p\": ", number(2 * pt(-abs(t), G - 1)), ",\n",
  " \"q\": ", number(p.adjust(2 * pt(-abs(t), G - 1), "BH")), ",\n",
  " \"dof\": ", whole$fit$df.residual, ",\n \"sigma\": ", sprintf("%.17g", summary(whole$fit)$sigma), ",\n",
  " \"wildDesigners\": 8,\n \"wildCr1\": ", number(small$se), ",\n \"wildP\": ", number(wild[1, ]), ",\n \"wildQuantile\": ", number(wild[2, ]), "\n}\n",
  sep = ""
)
