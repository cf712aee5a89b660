/** Ranges of what prints of a material are like: never a default for passing or failing anything. */
export interface PrintMaterial {
  readonly name: string;
  /** From, to. */
  readonly densityGCm3: readonly [number, number];
  readonly inPlaneMpa: readonly [number, number];
  /** Across layers. */
  readonly acrossLayersMpa: readonly [number, number];
  readonly softensC: readonly [number, number];
  readonly source: string;
}

/** Poisson ratio taken for printed plastics; 0.35–0.40 is usual (from memory). */
export const POISSON_PRINTED = 0.36;

/** Share of the in-plane strength that is planned for between layers (common practice, no source). */
export const LAYER_SHARE = 0.5;

export const printMaterials: readonly PrintMaterial[] = [
  {
    name: "PLA",
    densityGCm3: [1.24, 1.25],
    inPlaneMpa: [20, 60],
    acrossLayersMpa: [10, 30],
    softensC: [55, 60],
    source:
      "Processes 13(9) 2733 (2025); 22.8 MPa across layers, 3D Print. Addit. Manuf. doi 10.1089/3dp.2020.0109; rest from memory",
  },
  {
    name: "ABS",
    densityGCm3: [1.04, 1.04],
    inPlaneMpa: [20, 40],
    acrossLayersMpa: [4, 20],
    softensC: [100, 105],
    source: "Processes 13(9) 2733 (2025); Ahn et al. 2002, Rapid Prototyping J. 8(4) 248–257 (figures from memory)",
  },
  {
    name: "PETG",
    densityGCm3: [1.27, 1.27],
    inPlaneMpa: [30, 50],
    acrossLayersMpa: [15, 25],
    softensC: [71, 80],
    source: "Processes 13(9) 2733 (2025); J. Manuf. Mater. Process. 8(6) 295 (2024); ranges from memory",
  },
];

/** What a stress figure leaves out; printed beside every one. */
export const stressAssumptions: readonly string[] = [
  "Uniform solid material; infill, seams and voids are not known.",
  "Mean pull only: bending, sharp corners (2 to 3 times) and press fits are left out.",
  "Strength across printed layers may be half of that along them, or less.",
  "A warm hub creeps below the temperature at which the material softens.",
];

/** What to do before a printed rotor turns; shown wherever a stress is. */
export const spinCautions: readonly string[] = [
  "A printed rotor can burst or shed a blade, also far below any computed limit.",
  "Closed guard in the plane of rotation; eye protection; stand out of that plane, with nobody else in line.",
  "Raise the speed in steps, pause at each, listen; switch off from a distance.",
  "Stop on any new vibration; throw away a rotor with a crack, white mark or split layers.",
  "Never leave an unproven rotor running unattended; keep to the motor maker's largest speed.",
];
