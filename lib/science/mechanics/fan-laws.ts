/** A fan at one duty point; any one set of units, flow Q, pressure rise p, impeller (shaft) power P. */
export interface FanPoint {
  readonly flow: number;
  readonly pressure: number;
  readonly shaftPower: number;
}

/** Ratios new/old of speed, diameter and air density, dimensionless, > 0; left out: 1. */
export interface FanRatios {
  readonly speed?: number;
  readonly diameter?: number;
  readonly density?: number;
}

/**
 * Similarity laws for geometrically similar fans at the same point of rating (ISO 5801:2017; clause from memory):
 * Q ∝ n·d³, p ∝ ρ·n²·d², P ∝ ρ·n³·d⁵. Small blades lose efficiency when slowed (Reynolds number): guidance, not data.
 */
export function scaleFan(point: FanPoint, { speed = 1, diameter = 1, density = 1 }: FanRatios): FanPoint {
  return {
    flow: point.flow * speed * diameter ** 3,
    pressure: point.pressure * density * speed ** 2 * diameter ** 2,
    shaftPower: point.shaftPower * density * speed ** 3 * diameter ** 5,
  };
}

/** Change of sound level, dB: 50 lg of the speed ratio, 70 lg of the diameter's, 20 lg of the density's (value from memory, ±5 dB here). */
export function levelChangeDb({ speed = 1, diameter = 1, density = 1 }: FanRatios) {
  const speedDb = 50 * Math.log10(speed);
  const sizeDb = 70 * Math.log10(diameter);
  const densityDb = 20 * Math.log10(density);
  return { speedDb, sizeDb, densityDb, totalDb: speedDb + sizeDb + densityDb };
}

/** Where a fan curve meets the system curve; unstable where the fan's pressure rises faster than the system's. */
export interface DutyPoint {
  readonly flow: number;
  readonly pressure: number;
  readonly stable: boolean;
}

/**
 * All duty points on a measured curve (flow rising, straight between points, never beyond them) against p = k·Q². Empty
 * when they don't meet. @throws RangeError for flows that don't rise or a negative k.
 */
export function dutyPoints(curve: readonly { flow: number; pressure: number }[], k: number): DutyPoint[] {
  if (!(k >= 0)) throw new RangeError("the system's k is 0 or above");
  const found: DutyPoint[] = [];
  for (let i = 0; i + 1 < curve.length; i++) {
    const a = curve[i];
    const b = curve[i + 1];
    if (!a || !b) continue;
    if (!(b.flow > a.flow)) throw new RangeError("the curve's flows must rise");
    const slope = (b.pressure - a.pressure) / (b.flow - a.flow);
    const last = i + 2 === curve.length;
    for (const flow of rootsOf(k, -slope, slope * a.flow - a.pressure)) {
      if (flow < a.flow || flow > b.flow || (flow === b.flow && !last)) continue;
      found.push({ flow, pressure: a.pressure + slope * (flow - a.flow), stable: slope < 2 * k * flow });
    }
  }
  return found.sort((p, q) => p.flow - q.flow);
}

/** Real roots of a·x² + b·x + c without cancellation. */
function rootsOf(a: number, b: number, c: number): number[] {
  if (a === 0) return b === 0 ? [] : [-c / b];
  const discriminant = b * b - 4 * a * c;
  if (discriminant < 0) return [];
  const half = -0.5 * (b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant));
  if (half === 0) return [0];
  const roots = [half / a, c / half];
  return discriminant === 0 ? [half / a] : roots;
}

/** Duty point of the model curve p = p0·(1 − (Q/Qmax)²) against p = k·Q². */
export function dutyPointQuadratic(pressureAtZero: number, flowMax: number, k: number): DutyPoint {
  const flow = Math.sqrt(pressureAtZero / (k + pressureAtZero / flowMax ** 2));
  return { flow, pressure: k * flow * flow, stable: true };
}

/**
 * Two fans of one model curve: in series pressures add at equal flow, in parallel flows add at equal pressure (ideal).
 * Counter-rotation recovers swirl and can exceed it; no closed law.
 */
export function twoFansQuadratic(pressureAtZero: number, flowMax: number, k: number) {
  return {
    series: dutyPointQuadratic(2 * pressureAtZero, flowMax, k),
    parallel: dutyPointQuadratic(pressureAtZero, 2 * flowMax, k),
  };
}
