/**
 * Gamma and beta functions behind the distributions. Formulas: NIST Digital Library of Mathematical Functions
 * (DLMF) 5.11.1 (Stirling), 8.7.1 and 8.9.2 (incomplete gamma), 8.17.22 (incomplete beta as continued fraction).
 */
const HALF_LOG_TWO_PI = 0.9189385332046727;
const STIRLING = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156, -3617 / 122400];
const TINY = 1e-300;
const EPSILON = 1e-16;

/** What Stirling's formula leaves of ln Γ(x), x ≥ 10 (DLMF 5.11.1, eight terms: below 1e-17 there). */
function stirlingRest(x: number): number {
  const inverseSquare = 1 / (x * x);
  let total = 0;
  for (let k = STIRLING.length - 1; k >= 0; k--) total = total * inverseSquare + (STIRLING[k] ?? 0);
  return total / x;
}

/** ln Γ(x) for x > 0, dimensionless. NaN for x ≤ 0. */
export function logGamma(x: number): number {
  if (!(x > 0)) return Number.NaN;
  let shift = 1;
  let big = x;
  while (big < 10) shift *= big++;
  return (big - 0.5) * Math.log(big) - big + HALF_LOG_TWO_PI + stirlingRest(big) - Math.log(shift);
}

/** ln B(a, b) for a, b > 0 without the cancellation that three ln Γ would bring for large arguments. */
export function logBeta(a: number, b: number): number {
  const p = Math.min(a, b);
  const q = Math.max(a, b);
  if (q < 10) return logGamma(p) + logGamma(q) - logGamma(p + q);
  const rest = stirlingRest(q) - stirlingRest(p + q);
  const tail = (q - 0.5) * Math.log1p(-p / (p + q));
  if (p < 10) return logGamma(p) + rest + p - p * Math.log(p + q) + tail;
  return HALF_LOG_TWO_PI - 0.5 * Math.log(q) + stirlingRest(p) + rest + (p - 0.5) * Math.log(p / (p + q)) + tail;
}

/** Continued fraction of I_x(a, b) by Lentz's method (DLMF 8.17.22); quick for x < (a + 1)/(a + b + 2). */
function betaFraction(x: number, a: number, b: number): number {
  const step = (d: number) => (Math.abs(d) < TINY ? TINY : d);
  let c = 1;
  let d = 1 / step(1 - ((a + b) * x) / (a + 1));
  let value = d;
  for (let m = 1; m < 100_000; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / step(1 + even * d);
    c = step(1 + even / c);
    value *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / step(1 + odd * d);
    c = step(1 + odd / c);
    value *= d * c;
    if (Math.abs(d * c - 1) < 2 * EPSILON) break;
  }
  return value;
}

/**
 * Regularised incomplete beta I_x(a, b), 0..1. The argument is handed in as the pair x and y = 1 − x, so that neither
 * loses digits near an end. a, b > 0; x, y in 0..1.
 */
export function incompleteBeta(x: number, y: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (y <= 0) return 1;
  const logX = x < 0.5 ? Math.log(x) : Math.log1p(-y);
  const logY = y < 0.5 ? Math.log(y) : Math.log1p(-x);
  const front = Math.exp(a * logX + b * logY - logBeta(a, b));
  if (x < (a + 1) / (a + b + 2)) return (front * betaFraction(x, a, b)) / a;
  return 1 - (front * betaFraction(y, b, a)) / b;
}

/** x^a e^−x / Γ(a), written around x = a so that large arguments keep their digits. */
function gammaFront(a: number, x: number): number {
  if (a < 10) return Math.exp(a * Math.log(x) - x - logGamma(a));
  const d = (x - a) / a;
  const logRatio = d > -0.5 && d < 1 ? Math.log1p(d) : Math.log(x / a);
  return Math.exp(a * (logRatio - d) - stirlingRest(a)) * Math.sqrt(a / (2 * Math.PI));
}

/** Regularised incomplete gamma functions P(a, x) and Q(a, x) = 1 − P, each with its own digits. a > 0, x ≥ 0. */
export function incompleteGamma(a: number, x: number): { lower: number; upper: number } {
  if (x <= 0) return { lower: 0, upper: 1 };
  if (x === Infinity) return { lower: 1, upper: 0 };
  const front = gammaFront(a, x);
  if (x < a + 1) {
    let term = 1 / a;
    let total = term;
    for (let n = 1; n < 1_000_000 && term > total * EPSILON; n++) {
      term *= x / (a + n);
      total += term;
    }
    const lower = front * total;
    return { lower, upper: 1 - lower };
  }
  let b = x + 1 - a;
  let c = 1 / TINY;
  let d = 1 / b;
  let value = d;
  for (let n = 1; n < 1_000_000; n++) {
    const an = -n * (n - a);
    b += 2;
    d = 1 / (Math.abs(an * d + b) < TINY ? TINY : an * d + b);
    c = Math.abs(b + an / c) < TINY ? TINY : b + an / c;
    value *= d * c;
    if (Math.abs(d * c - 1) < 2 * EPSILON) break;
  }
  const upper = front * value;
  return { lower: 1 - upper, upper };
}
