import { z } from "zod";

const number = z.number();
const station = z.object({
  spanFraction: number,
  radiusMm: number,
  pitchDeg: number,
  chordMm: number,
  solidity: number,
});

/** One rotor as read; the mass is at 1 g/cm³, null where the mesh isn't closed. */
export const readRotor = z.looseObject({
  blades: z.int(),
  hand: z.enum(["right", "left"]),
  tipDiameterMm: number,
  sweptDiameterMm: number,
  hubDiameterMm: number,
  axialDepthMm: number,
  shroud: z.boolean(),
  stations: z.array(station),
  spacingDeg: z.array(number),
  massG: number.nullable(),
  confidence: number,
});
export type ReadRotor = z.infer<typeof readRotor>;

/** What a version of the reader found in a model file, as stored. Parts that only drawings need are kept as they come. */
export const meshReadingResult = z.looseObject({
  format: z.enum(["stl-binary", "stl-ascii", "3mf"]),
  /** Millimetres in one unit of the file: the file says so, a person said so, or it was guessed from the size. */
  unit: z.object({ mmPerUnit: number, from: z.enum(["file", "said", "guessed"]) }),
  triangles: z.int(),
  shells: z.int(),
  watertight: z.boolean(),
  openEdges: z.int(),
  misorientedEdges: z.int(),
  overlap: z.boolean(),
  volumeMm3: number.nullable(),
  areaMm2: number,
  /** At 1 g/cm³. */
  massG: number.nullable(),
  rotors: z.array(readRotor),
  stages: z.int(),
  spacingsMm: z.array(number),
  struts: z.int().nullable(),
  /** Read from version 2 of the reader on. */
  strutsConfidence: number.nullable().default(null),
  inletStack: z
    .object({ kind: z.enum(["straight", "bellmouth", "cone"]), lengthMm: number, confidence: number })
    .nullable()
    .default(null),
  spacer: z.object({ lengthMm: number, confidence: number }).nullable().default(null),
  warnings: z.array(z.object({ code: z.string(), message: z.string() })),
});
export type MeshReadingResult = z.infer<typeof meshReadingResult>;
