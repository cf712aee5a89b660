import type { BladeStation } from "./blade-row";
import type { FaultPlace } from "./edges";
import type { FrameFit } from "./frame-fit";
import type { FrameSpec } from "./frames";
import type { Bounds, Mesh, Vec3 } from "./mesh";
import type { MeshWarning } from "./reading";
import type { InletStack, Spacer } from "./standing-parts";
import type { Correction } from "@/lib/science/mechanics/balance";

/** What a person may say about a file before it is analysed. */
export interface AnalysisOptions {
  /** Direction of the rotation axis; found from the mesh where left out. */
  readonly axis?: "x" | "y" | "z";
  /** Density of the print, g/cm³. PLA (1.24) where left out. */
  readonly densityGCm3?: number;
  /** Speed at which grade, tip speed and stresses are told. */
  readonly speedRpm?: number;
  readonly frame?: FrameSpec;
}

/** One rotor: a row of blades and what turns with it. */
export interface RotorTraits {
  readonly blades: number;
  readonly hand: "right" | "left";
  readonly tipDiameterMm: number;
  readonly sweptDiameterMm: number;
  readonly hubDiameterMm: number;
  /** Bore of the hub; 0 for none. */
  readonly boreDiameterMm: number;
  /** Extent along the axis of all that turns with the blades. */
  readonly axialDepthMm: number;
  /** Heights along the axis of the same, from the axis point. */
  readonly fromMm: number;
  readonly toMm: number;
  readonly shroud: boolean;
  readonly stations: BladeStation[];
  /** Angles between neighbouring blades, degrees, in order; they sum to 360. */
  readonly spacingDeg: number[];
  readonly massG: number | null;
  readonly staticUnbalanceGmm: number | null;
  readonly coupleUnbalanceGmm2: number | null;
  /** Mass at the hub's radius that takes the static unbalance away, and where. */
  readonly correction: Correction | null;
  readonly balanceGrade: string | null;
  readonly tipSpeedMs: number | null;
  readonly hoopMpa: number | null;
  readonly rootMpa: number | null;
  /** 0–1: how well counts on many cylinders agree. */
  readonly confidence: number;
}

/** Everything that Fanfold reads from a mesh. */
export interface MeshAnalysis {
  readonly triangles: number;
  readonly shells: number;
  readonly watertight: boolean;
  readonly openEdges: number;
  readonly misorientedEdges: number;
  readonly nonManifoldEdges: number;
  readonly faults: FaultPlace[];
  readonly overlap: boolean;
  readonly volumeMm3: number | null;
  readonly areaMm2: number;
  readonly massG: number | null;
  readonly centreMm: Vec3 | null;
  readonly boundsMm: Bounds;
  readonly axis: { readonly pointMm: Vec3; readonly direction: Vec3 } | null;
  readonly rotors: RotorTraits[];
  readonly stages: number;
  /** Free lengths between neighbouring rotors along the axis, mm; below zero where they interleave. */
  readonly spacingsMm: number[];
  /** Struts seen beside the rotors; null where nothing stands still in the file. */
  readonly struts: number | null;
  /** 0–1; null where there is no count. */
  readonly strutsConfidence: number | null;
  /** Null where the file has no such part of its own. */
  readonly inletStack: InletStack | null;
  readonly spacer: Spacer | null;
  readonly fit: FrameFit | null;
  readonly warnings: MeshWarning[];
  /** The mesh as judged: outward, copies taken apart. For drawings and swept volumes. */
  readonly mesh: Mesh;
}
