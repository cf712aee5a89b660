/**
 * Bessel function of the first kind of whole order n ≥ 0, real x, by Bessel's integral
 * (1/π)∫₀^π cos(nτ − x sin τ) dτ with the trapezoid rule, which converges exponentially on a periodic integrand.
 * Good to about 1e-14 for x and n up to some tens. Source: DLMF 10.9.2.
 */
export function besselJ(order: number, x: number): number {
  const steps = 64 + 4 * Math.ceil(Math.abs(x) + order);
  let sum = 0.5 * (1 + Math.cos(order * Math.PI));
  for (let i = 1; i < steps; i += 1) {
    const angle = (Math.PI * i) / steps;
    sum += Math.cos(order * angle - x * Math.sin(angle));
  }
  return sum / steps;
}

/** J₁(x). */
export function besselJ1(x: number): number {
  return besselJ(1, x);
}

/** Derivative of J_n at x: (J_{n−1} − J_{n+1})/2; −J₁ for order 0. Source: DLMF 10.6.1. */
export function besselJPrime(order: number, x: number): number {
  return order === 0 ? -besselJ1(x) : (besselJ(order - 1, x) - besselJ(order + 1, x)) / 2;
}

/** First positive zero of J_n′ (0 for order 0, whose first extremum is at the origin). Source: DLMF 10.21. */
export function firstExtremumOfJ(order: number): number {
  if (order === 0) return 0;
  let low = order;
  let high = order + 1;
  while (besselJPrime(order, high) > 0) high += 1;
  for (let i = 0; i < 60; i += 1) {
    const middle = (low + high) / 2;
    if (besselJPrime(order, middle) > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
