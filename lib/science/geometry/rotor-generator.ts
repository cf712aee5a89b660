import type { Mesh } from "./mesh";

/** One parametric axial rotor about z. Lengths in mm; blades are helicoidal plates of constant helix pitch. */
export interface RotorSpec {
  readonly blades: number;
  readonly hand: "right" | "left";
  /** Rise of the blade's helix in one turn. */
  readonly helixPitchMm: number;
  /** Chord along the blade at the root; at the tip `chordTipMm` (the same where left out). */
  readonly chordMm: number;
  readonly chordTipMm?: number;
  readonly thicknessMm: number;
  /** Height of a circular-arc camber line over the chord, as a share of the chord. 0 where left out. */
  readonly camber?: number;
  /** Angle by which the tip runs ahead of the root, rad. 0 where left out. */
  readonly sweepRad?: number;
  readonly hubRadiusMm: number;
  readonly tipRadiusMm: number;
  readonly hubDepthMm: number;
  /** Bore of the hub; none where left out or 0. */
  readonly boreRadiusMm?: number;
  /** Ring at the tips: it begins `RING_BITE_MM` inside the blades' tips. */
  readonly shroud?: { readonly thicknessMm: number; readonly depthMm: number };
  /** Angles of the blades, rad; equal spacing where left out. */
  readonly anglesRad?: readonly number[];
  /** Height of the rotor's middle. 0 where left out. */
  readonly middleZMm?: number;
  /** Corners of the hub and of half the ring. 96 where left out. */
  readonly facets?: number;
  /** Steps of a blade's grid along the span and along the chord. 16 and 12 where left out. */
  readonly bladeSteps?: { readonly span: number; readonly chord: number };
}

const SPAN_STEPS = 16;
const CHORD_STEPS = 12;
/** Depth by which blades reach into the hub, so that the shells overlap as drawn models do. */
const ROOT_BITE_MM = 2;
const RING_BITE_MM = 0.5;

/** Collects the vertices and triangles of several closed shells. */
class ShellBuilder {
  readonly positions: number[] = [];
  readonly triangles: number[] = [];

  vertex(x: number, y: number, z: number): number {
    this.positions.push(x, y, z);
    return this.positions.length / 3 - 1;
  }

  /** Two triangles over a, b, c, d, anticlockwise seen from outside. */
  quad(a: number, b: number, c: number, d: number): void {
    this.triangles.push(a, b, c, a, c, d);
  }

  /** A body of revolution about z through the closed profile of (r, z) points, anticlockwise in the r–z plane. */
  revolve(profile: readonly (readonly [number, number])[], facets: number): void {
    const first = this.positions.length / 3;
    const n = profile.length;
    for (let k = 0; k < facets; k++) {
      const angle = (2 * Math.PI * k) / facets;
      for (const [r, z] of profile) this.vertex(r * Math.cos(angle), r * Math.sin(angle), z);
    }
    for (let k = 0; k < facets; k++) {
      const here = first + k * n;
      const next = first + ((k + 1) % facets) * n;
      for (let i = 0; i < n; i++) this.quad(here + i, next + i, next + ((i + 1) % n), here + ((i + 1) % n));
    }
  }

  /** A solid cylinder about z. */
  cylinder(radius: number, zFrom: number, zTo: number, facets: number): void {
    const bottom = this.vertex(0, 0, zFrom);
    const top = this.vertex(0, 0, zTo);
    const first = this.positions.length / 3;
    for (let k = 0; k < facets; k++) {
      const angle = (2 * Math.PI * k) / facets;
      this.vertex(radius * Math.cos(angle), radius * Math.sin(angle), zFrom);
      this.vertex(radius * Math.cos(angle), radius * Math.sin(angle), zTo);
    }
    for (let k = 0; k < facets; k++) {
      const here = first + 2 * k;
      const next = first + 2 * ((k + 1) % facets);
      this.quad(here, next, next + 1, here + 1);
      this.triangles.push(bottom, next, here, top, here + 1, next + 1);
    }
  }
}

/**
 * The demo's rotor: a hub, blades that bite into it and an optional ring, as closed shells that overlap. Construction
 * as in the reference generator of the house (span 16 steps, chord 12 steps, plate thickness across the chord).
 * Throws a RangeError for fewer than one blade or radii that don't rise.
 */
export function generateRotor(spec: RotorSpec): Mesh {
  return generateRotors([spec]);
}

/** Several rotors in one mesh, each at its own height. */
export function generateRotors(specs: readonly RotorSpec[]): Mesh {
  const builder = new ShellBuilder();
  for (const spec of specs) addRotor(builder, spec);
  return { positions: Float64Array.from(builder.positions), triangles: Uint32Array.from(builder.triangles) };
}

function addRotor(builder: ShellBuilder, spec: RotorSpec): void {
  const bore = spec.boreRadiusMm ?? 0;
  if (spec.blades < 1 || !(bore < spec.hubRadiusMm && spec.hubRadiusMm < spec.tipRadiusMm)) {
    throw new RangeError("a rotor needs a blade, and bore < hub < tip");
  }
  const middle = spec.middleZMm ?? 0;
  const facets = spec.facets ?? 96;
  const [zFrom, zTo] = [middle - spec.hubDepthMm / 2, middle + spec.hubDepthMm / 2];
  if (bore > 0) {
    const profile = [
      [bore, zFrom],
      [spec.hubRadiusMm, zFrom],
      [spec.hubRadiusMm, zTo],
      [bore, zTo],
    ] as const;
    builder.revolve(profile, facets);
  } else builder.cylinder(spec.hubRadiusMm, zFrom, zTo, facets);
  for (let blade = 0; blade < spec.blades; blade++) {
    addBlade(builder, spec, spec.anglesRad?.[blade] ?? (2 * Math.PI * blade) / spec.blades, middle);
  }
  if (spec.shroud) {
    const inner = spec.tipRadiusMm - RING_BITE_MM;
    const outer = spec.tipRadiusMm + spec.shroud.thicknessMm;
    const half = spec.shroud.depthMm / 2;
    const profile = [
      [inner, middle - half],
      [outer, middle - half],
      [outer, middle + half],
      [inner, middle + half],
    ] as const;
    builder.revolve(profile, 2 * facets);
  }
}

function addBlade(builder: ShellBuilder, spec: RotorSpec, angle: number, middle: number): void {
  const { span: spanSteps, chord: chordSteps } = spec.bladeSteps ?? { span: SPAN_STEPS, chord: CHORD_STEPS };
  const chi = spec.hand === "right" ? 1 : -1;
  const rootRadius = Math.max(spec.hubRadiusMm - ROOT_BITE_MM, (spec.boreRadiusMm ?? 0) + 0.2);
  const first = builder.positions.length / 3;
  const id = (a: number, b: number, s: number): number => first + (a * (chordSteps + 1) + b) * 2 + s;
  for (let a = 0; a <= spanSteps; a++) {
    const span = a / spanSteps;
    const r = rootRadius + (spec.tipRadiusMm - rootRadius) * span;
    const beta = Math.atan(spec.helixPitchMm / (2 * Math.PI * r));
    const chord = spec.chordMm + ((spec.chordTipMm ?? spec.chordMm) - spec.chordMm) * span;
    for (let b = 0; b <= chordSteps; b++) {
      const u = (b / chordSteps - 0.5) * chord;
      const bow = (spec.camber ?? 0) * chord * (1 - ((2 * u) / chord) ** 2);
      for (let s = 0; s < 2; s++) {
        const w = (s - 0.5) * spec.thicknessMm + bow;
        const arc = u * Math.cos(beta) - chi * w * Math.sin(beta);
        const theta = angle + arc / r + (spec.sweepRad ?? 0) * span;
        builder.vertex(
          r * Math.cos(theta),
          r * Math.sin(theta),
          middle + chi * u * Math.sin(beta) + w * Math.cos(beta),
        );
      }
    }
  }
  for (let a = 0; a < spanSteps; a++) {
    for (let b = 0; b < chordSteps; b++) {
      builder.quad(id(a, b, 1), id(a + 1, b, 1), id(a + 1, b + 1, 1), id(a, b + 1, 1));
      builder.quad(id(a, b, 0), id(a, b + 1, 0), id(a + 1, b + 1, 0), id(a + 1, b, 0));
    }
    builder.quad(id(a, 0, 0), id(a + 1, 0, 0), id(a + 1, 0, 1), id(a, 0, 1));
    builder.quad(id(a, chordSteps, 0), id(a, chordSteps, 1), id(a + 1, chordSteps, 1), id(a + 1, chordSteps, 0));
  }
  for (let b = 0; b < chordSteps; b++) {
    builder.quad(id(0, b, 0), id(0, b, 1), id(0, b + 1, 1), id(0, b + 1, 0));
    builder.quad(id(spanSteps, b, 0), id(spanSteps, b + 1, 0), id(spanSteps, b + 1, 1), id(spanSteps, b, 1));
  }
}
