/** What plain blades are drawn from. */
export interface TraitBlades {
  readonly blades: number;
  readonly hand: "right" | "left";
  readonly hubRadiusMm: number;
  readonly tipRadiusMm: number;
  readonly pitchMidDeg: number;
  readonly chordMidMm: number;
}

const SPAN_STEPS = 14;
const EDGE = 1e-9;

/** Helix of constant pitch through the middle of the span: angle from the plane of rotation at a radius, rad. */
function pitchAt(rotor: TraitBlades, radius: number): number {
  const middle = (rotor.hubRadiusMm + rotor.tipRadiusMm) / 2;
  return Math.atan((Math.tan((rotor.pitchMidDeg * Math.PI) / 180) * middle) / radius);
}

const radii = ({ hubRadiusMm, tipRadiusMm }: TraitBlades): number[] =>
  Array.from({ length: SPAN_STEPS + 1 }, (_, i) => hubRadiusMm + ((tipRadiusMm - hubRadiusMm) * i) / SPAN_STEPS);

/** Half of the angle that a blade spans about the axis at a radius, rad. */
const halfAngle = (rotor: TraitBlades, radius: number): number =>
  (rotor.chordMidMm * Math.cos(pitchAt(rotor, radius))) / (2 * radius);

/** Extent along the axis of a plain blade, which is deepest at the hub, mm. */
export function bladeDepthMm(rotor: TraitBlades): number {
  return rotor.chordMidMm * Math.sin(pitchAt(rotor, rotor.hubRadiusMm));
}

/**
 * Lines of the blades seen from the inlet, y up: each blade's near edge, its far edge where the next blade doesn't
 * cover it, and its tip. Seen against the axis' direction, a right-handed blade is nearest at its clockwise edge.
 */
export function frontBlades(rotor: TraitBlades): number[][] {
  const step = (2 * Math.PI) / rotor.blades;
  const near = rotor.hand === "right" ? -1 : 1;
  const lines: number[][] = [];
  for (let blade = 0; blade < rotor.blades; blade++) {
    const middle = Math.PI / 2 + blade * step;
    const edge = (side: number, from: (r: number) => boolean): number[] =>
      radii(rotor).flatMap((r) => {
        const angle = middle + side * halfAngle(rotor, r);
        return from(r) ? [r * Math.cos(angle), r * Math.sin(angle)] : [];
      });
    const free = (r: number): boolean => 2 * halfAngle(rotor, r) < step + EDGE;
    lines.push(
      edge(near, () => true),
      edge(-near, free),
      tipArc(rotor, middle + near * halfAngle(rotor, rotor.tipRadiusMm), -near, step),
    );
  }
  return lines.filter((line) => line.length >= 4);
}

/** The tip from its near edge on, as far as the next blade leaves it free. */
function tipArc(rotor: TraitBlades, from: number, way: number, step: number): number[] {
  const span = Math.min(step, 2 * halfAngle(rotor, rotor.tipRadiusMm));
  return Array.from({ length: SPAN_STEPS + 1 }, (_, i) => from + (way * span * i) / SPAN_STEPS).flatMap((angle) => [
    rotor.tipRadiusMm * Math.cos(angle),
    rotor.tipRadiusMm * Math.sin(angle),
  ]);
}

/**
 * Outlines of the blades seen from the side, the axis to the right and the front's y up; those behind the axis first,
 * each list from far to near. No blade reaches further than `halfDepthMm` from the middle of the rotor.
 */
export function sideBlades(
  rotor: TraitBlades,
  middleMm: number,
  halfDepthMm: number,
): { behind: number[][]; before: number[][] } {
  const turn = rotor.hand === "right" ? 1 : -1;
  const seen = Array.from({ length: rotor.blades }, (_, blade) => {
    const angle = Math.PI / 2 + (2 * Math.PI * blade) / rotor.blades;
    const edge = (side: number): number[][] =>
      radii(rotor).map((r) => {
        const rise = Math.min(halfDepthMm, (rotor.chordMidMm * Math.sin(pitchAt(rotor, r))) / 2);
        return [middleMm + side * turn * rise, r * Math.sin(angle + side * halfAngle(rotor, r))];
      });
    const tip = Array.from({ length: SPAN_STEPS - 1 }, (_, i) => {
      const side = 1 - (2 * (i + 1)) / SPAN_STEPS;
      const r = rotor.tipRadiusMm;
      const rise = Math.min(halfDepthMm, (rotor.chordMidMm * Math.sin(pitchAt(rotor, r))) / 2);
      return [middleMm + side * turn * rise, r * Math.sin(angle + side * halfAngle(rotor, r))];
    });
    return { depth: Math.cos(angle), outline: [...edge(1), ...tip, ...edge(-1).reverse()].flat() };
  }).sort((a, b) => a.depth - b.depth);
  return {
    behind: seen.filter((blade) => blade.depth < 0).map((blade) => blade.outline),
    before: seen.filter((blade) => blade.depth >= 0).map((blade) => blade.outline),
  };
}
