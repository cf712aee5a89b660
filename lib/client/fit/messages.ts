import type { MeshAnalysis, RotorTraits } from "@/lib/science/geometry/analysis-types";
import type { Turnable } from "@/lib/science/geometry/drawing/turnable";
import type { FanDrawing } from "@/lib/science/geometry/drawing/drawn-view";
import type { ModelFormat } from "@/lib/science/geometry/model-file";
import type { MeshWarning } from "@/lib/science/geometry/reading";
import type { LengthUnit } from "@/lib/science/geometry/units";

import type { Comparison, Surroundings } from "./compare-model";

/** Density and speed that the worker measures at; every figure is carried from there to those on the page. */
export const MEASURED_AT = { densityGCm3: 1, speedRpm: 1000 } as const;

export type { LengthUnit, RotorTraits };

/** A model file that has been read; it isn't measured before its unit is known. */
export interface ModelFile {
  readonly name: string;
  readonly bytes: number;
  readonly format: ModelFormat;
  readonly triangles: number;
  /** Largest extent, in the file's unit. */
  readonly extent: number;
  /** The unit that the file itself names, in mm; undefined for an STL. */
  readonly mmPerUnit: number | undefined;
  readonly guess: LengthUnit | "cm?" | "unknown";
  readonly warnings: readonly MeshWarning[];
}

/** All that is read off the mesh but the mesh itself. Masses at 1 g/cm³, stresses at that and 1,000 r/min. */
export type ModelMeasured = Omit<MeshAnalysis, "mesh">;

export type WorkerRequest =
  | { readonly kind: "read"; readonly job: number; readonly file: File }
  | { readonly kind: "measure"; readonly job: number; readonly mmPerUnit: number }
  /** Ready to be turned in 3D: the model that was measured, or a file. */
  | { readonly kind: "turn"; readonly job: number; readonly file?: File }
  /** Against a frame, a season and its bench; only once the model is measured. */
  | { readonly kind: "compare"; readonly job: number; readonly ask: number; readonly around: Surroundings };

export type WorkerAnswer =
  /** Said once, when the worker has all that it needs. */
  | { readonly kind: "ready" }
  | { readonly kind: "progress"; readonly job: number; readonly read: number; readonly expected: number | undefined }
  | { readonly kind: "read"; readonly job: number; readonly model: ModelFile }
  | { readonly kind: "measured"; readonly job: number; readonly measured: ModelMeasured }
  /** After `measured`, as drawing takes a while longer. `svg` is both views as one document. */
  | { readonly kind: "drawn"; readonly job: number; readonly drawing: FanDrawing; readonly svg: string }
  /** The answer to the comparison `ask`; undefined where there is no rotor to compare. */
  | {
      readonly kind: "compared";
      readonly job: number;
      readonly ask: number;
      readonly comparison: Comparison | undefined;
    }
  | { readonly kind: "turnable"; readonly job: number; readonly model: Turnable }
  | { readonly kind: "refused"; readonly job: number; readonly code: string; readonly message: string };
