import { firstExtremumOfJ } from "./bessel";

/** Highest harmonic of blade passing, and highest |m₁| + |m₂| of interaction, that are predicted. */
export const HARMONICS = 8;
export const INTERACTION_ORDER = 6;

export interface RotorSet {
  /** One or two blade counts, rotor 1 first. */
  blades: readonly number[];
  /** Speeds in rpm, one a rotor. */
  rpm: readonly number[];
  /** Which way rotor 2 turns; only mode orders depend on it. */
  rotation?: "counter" | "co";
  /** Struts or vanes downstream; undefined where unknown or none. */
  struts?: number;
}

export interface PredictedTone {
  kind: "blade-passing" | "interaction";
  /** 1 or 2 for blade passing; null for interaction. */
  rotor: 1 | 2 | null;
  /** Harmonics of rotor 1's and rotor 2's blade passing; m₁·f₁ + m₂·f₂ is positive. */
  m1: number;
  m2: number;
  frequencyHz: number;
  /** Circumferential order; null where it takes the sense of rotation and that is not given. */
  modeOrder: number | null;
  /** Orders m·B − k·V that struts make of blade passing, |order| below V, smallest first; null elsewhere. */
  strutModes: number[] | null;
}

/** Blade passing frequency of harmonic m, Hz: m·B·n/60. Source: kinematics. */
export function bladePassingHz(blades: number, rpm: number, harmonic = 1): number {
  return (harmonic * blades * rpm) / 60;
}

/**
 * Circumferential order of an interaction tone: m₁B₁ − m₂B₂ against each other, m₁B₁ + m₂B₂ the same way round.
 * Source: Hanson (1985), J. Aircraft 22(7):609–617; Tyler & Sofrin (1962), SAE Trans. 70:309–332.
 */
export function interactionModeOrder(
  [b1, b2]: readonly [number, number],
  m1: number,
  m2: number,
  rotation: "counter" | "co",
): number {
  return m1 * b1 + (rotation === "counter" ? -1 : 1) * m2 * b2;
}

/**
 * Orders ν = m·B − k·V with |ν| below V that V struts make of harmonic m, smallest magnitude first. Order 0 radiates
 * most, then 1 (Huang 2003, JASA 114(6):3189–3200). Empty without struts.
 * Source: Tyler & Sofrin (1962), SAE Trans. 70:309–332.
 */
export function strutModeOrders(blades: number, struts: number, harmonic: number): number[] {
  if (!(struts >= 1)) return [];
  const rest = (harmonic * blades) % struts;
  if (rest === 0) return [0];
  return [rest, rest - struts].sort((a, b) => Math.abs(a) - Math.abs(b) || b - a);
}

/** Frequency in Hz below which a mode order decays in a hard-walled duct of a radius in m, without flow. */
export function cutOnHz(modeOrder: number, radiusM: number, speedMS: number): number {
  return (firstExtremumOfJ(Math.abs(modeOrder)) * speedMS) / (2 * Math.PI * radiusM);
}

/**
 * Every tone that one or two rotors can make: blade passing up to harmonic 8 and interaction up to |m₁| + |m₂| = 6, in
 * rising frequency. It says where tones can be, not how strong they are. Rigid, equally spaced blades, steady speeds.
 *
 * In: see RotorSet; speeds above 0. Out: frequencies in Hz above 0.
 * Source: Tyler & Sofrin (1962); Hanson (1985).
 */
export function predictTones(set: RotorSet): PredictedTone[] {
  const tones: PredictedTone[] = [];
  set.blades.slice(0, 2).forEach((blades, index) => {
    for (let m = 1; m <= HARMONICS; m += 1) {
      tones.push({
        kind: "blade-passing",
        rotor: index === 0 ? 1 : 2,
        m1: index === 0 ? m : 0,
        m2: index === 0 ? 0 : m,
        frequencyHz: bladePassingHz(blades, set.rpm[index] ?? 0, m),
        modeOrder: index === 0 || set.rotation === "co" ? m * blades : set.rotation === "counter" ? -m * blades : null,
        strutModes: set.struts === undefined ? null : strutModeOrders(blades, set.struts, m),
      });
    }
  });
  const [b1, b2] = set.blades;
  if (b1 !== undefined && b2 !== undefined) tones.push(...interactionTones([b1, b2], set));
  return tones.filter((tone) => tone.frequencyHz > 0).sort((a, b) => a.frequencyHz - b.frequencyHz);
}

function interactionTones(blades: readonly [number, number], set: RotorSet): PredictedTone[] {
  const tones: PredictedTone[] = [];
  const f1 = bladePassingHz(blades[0], set.rpm[0] ?? 0);
  const f2 = bladePassingHz(blades[1], set.rpm[1] ?? 0);
  for (let m1 = 1; m1 < INTERACTION_ORDER; m1 += 1) {
    for (let m2 = -(INTERACTION_ORDER - m1); m2 <= INTERACTION_ORDER - m1; m2 += 1) {
      if (m2 === 0) continue;
      const signed = m1 * f1 + m2 * f2;
      const sign = signed < 0 ? -1 : 1;
      tones.push({
        kind: "interaction",
        rotor: null,
        m1: sign * m1,
        m2: sign * m2,
        frequencyHz: Math.abs(signed),
        modeOrder: set.rotation === undefined ? null : interactionModeOrder(blades, sign * m1, sign * m2, set.rotation),
        strutModes: null,
      });
    }
  }
  return tones;
}
