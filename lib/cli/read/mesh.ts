import { open, type FileHandle } from "node:fs/promises";
import { parseArgs } from "node:util";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import type { AnalysisOptions, MeshAnalysis, RotorTraits } from "@/lib/science/geometry/analysis-types";
import { frameByName, frameSizesMm } from "@/lib/science/geometry/frames";
import { meshBounds, scaledMesh } from "@/lib/science/geometry/mesh";
import { readModelFile, type ModelReading } from "@/lib/science/geometry/model-file";
import type { ByteSource, MeshWarning } from "@/lib/science/geometry/reading";
import { guessUnit, lengthUnits, mmPerUnit, type LengthUnit } from "@/lib/science/geometry/units";
import { ReadError } from "./fail";

const USAGE = "read -- mesh FILE [--unit mm|cm|m|in] [--axis x|y|z] [--density G_PER_CM3] [--rpm N] [--frame 120x25]";

interface MeshArguments {
  readonly file: string;
  readonly unit: LengthUnit | undefined;
  readonly analysis: AnalysisOptions;
}

/**
 * `read -- mesh`: one model file in, one JSON object out (lengths in mm, null where a thing can't be known). Throws a
 * Refusal for bad arguments (code "bad-arguments") and for files that can't be measured.
 */
export async function readMesh(args: string[]): Promise<object> {
  const wanted = parseMeshArguments(args);
  const began = performance.now();
  const handle = await openFile(wanted.file);
  try {
    const source = fileSource(handle, (await handle.stat()).size);
    const reading = await readModelFile(source, { elapsedMs: () => performance.now() - began });
    const { unit, scale, warnings } = chooseUnit(reading, wanted.unit);
    const mesh = scale === 1 ? reading.mesh : scaledMesh(reading.mesh, scale);
    const analysis = analyseMesh(mesh, wanted.analysis);
    return meshReport(reading, unit, analysis, [...reading.warnings, ...warnings, ...analysis.warnings]);
  } finally {
    await handle.close();
  }
}

function parseMeshArguments(args: string[]): MeshArguments {
  const { values, positionals } = parsed(args);
  const [file] = positionals;
  if (file === undefined || positionals.length > 1)
    throw new ReadError("bad-arguments", `One file is needed: ${USAGE}`);
  const unit = oneOf(values.unit, lengthUnits, "--unit");
  const axis = oneOf(values.axis, ["x", "y", "z"] as const, "--axis");
  const frame = values.frame === undefined ? undefined : frameByName(values.frame);
  if (values.frame !== undefined && !frame) {
    throw new ReadError(
      "bad-arguments",
      `--frame is SIZExDEPTH in mm with a size of ${frameSizesMm.join(", ")}.`,
      "--frame",
    );
  }
  const analysis: AnalysisOptions = {
    ...(axis && { axis }),
    ...(frame && { frame }),
    ...(values.density !== undefined && { densityGCm3: aboveZero(values.density, "--density") }),
    ...(values.rpm !== undefined && { speedRpm: aboveZero(values.rpm, "--rpm") }),
  };
  return { file, unit, analysis };
}

function parsed(args: string[]) {
  const text = { type: "string" } as const;
  try {
    return parseArgs({
      args,
      allowPositionals: true,
      options: { unit: text, axis: text, density: text, rpm: text, frame: text },
    });
  } catch (error) {
    throw new ReadError("bad-arguments", `${error instanceof Error ? error.message : "Bad arguments"}. ${USAGE}`);
  }
}

function oneOf<T extends string>(value: string | undefined, choices: readonly T[], name: string): T | undefined {
  if (value === undefined) return undefined;
  const choice = choices.find((candidate) => candidate === value);
  if (choice === undefined) throw new ReadError("bad-arguments", `${name} is one of ${choices.join(", ")}.`, name);
  return choice;
}

function aboveZero(text: string, name: string): number {
  const value = Number(text);
  if (text.trim() === "" || !Number.isFinite(value) || value <= 0) {
    throw new ReadError("bad-arguments", `${name} is a number above zero.`, name);
  }
  return value;
}

async function openFile(path: string): Promise<FileHandle> {
  try {
    const handle = await open(path, "r");
    if ((await handle.stat()).isFile()) return handle;
    await handle.close();
  } catch {
    // Told below in one way, whatever the reason.
  }
  throw new ReadError("file-unreadable", "The file isn't there or can't be read.", path);
}

/** An open file as a source. One buffer serves all readings, so that a large file doesn't pile up garbage. */
export function fileSource(handle: FileHandle, size: number): ByteSource {
  let buffer = new Uint8Array(0);
  return {
    size,
    read: async (offset, length) => {
      if (buffer.length < length) buffer = new Uint8Array(length);
      let filled = 0;
      while (filled < length) {
        const { bytesRead } = await handle.read(buffer, filled, length - filled, offset + filled);
        if (bytesRead === 0) break;
        filled += bytesRead;
      }
      return buffer.subarray(0, filled);
    },
  };
}

function chooseUnit(
  reading: ModelReading,
  named: LengthUnit | undefined,
): { unit: string; scale: number; warnings: MeshWarning[] } {
  const warnings: MeshWarning[] = [];
  const own = reading.mmPerUnit;
  if (named === undefined && own !== undefined) {
    const unit = lengthUnits.find((candidate) => mmPerUnit[candidate] === own);
    const bounds = meshBounds(reading.mesh);
    const extentMm = bounds ? own * Math.max(...bounds.max.map((value, axis) => value - (bounds.min[axis] ?? 0))) : 0;
    if (guessUnit(extentMm) !== "mm")
      warnings.push({ code: "unit-suspect", message: sizeNote(extentMm, "mm by the file's own unit") });
    return { unit: unit ?? (own === 0.001 ? "micron" : "foot"), scale: own, warnings };
  }
  const unit = named ?? "mm";
  const scale = mmPerUnit[unit];
  if (named !== undefined && own !== undefined && own !== scale) {
    warnings.push({
      code: "scale-overridden",
      message: `The file says 1 unit is ${own} mm; it was read as ${scale} mm, as asked.`,
    });
  }
  const bounds = meshBounds(reading.mesh);
  const extent = bounds ? Math.max(...bounds.max.map((value, axis) => value - (bounds.min[axis] ?? 0))) : 0;
  if (guessUnit(extent * scale) !== "mm")
    warnings.push({ code: "unit-suspect", message: sizeNote(extent * scale, unit) });
  return { unit, scale, warnings };
}

function sizeNote(extentMm: number, how: string): string {
  const guess = guessUnit(extentMm);
  const size = Number(extentMm.toPrecision(4));
  const advice = guess === "unknown" ? "please check the unit" : `the file may be in ${guess === "cm?" ? "cm" : guess}`;
  return `The largest extent would be ${size} mm (${how}), which is no usual fan: ${advice}. Nothing was converted.`;
}

function meshReport(reading: ModelReading, unit: string, a: MeshAnalysis, warnings: MeshWarning[]): object {
  return {
    kind: "mesh",
    format: reading.format,
    unit,
    triangles: a.triangles,
    shells: a.shells,
    watertight: a.watertight,
    openEdges: a.openEdges,
    misorientedEdges: a.misorientedEdges,
    overlap: a.overlap,
    volumeMm3: a.volumeMm3,
    areaMm2: a.areaMm2,
    boundsMm: a.boundsMm,
    axis: a.axis,
    rotors: a.rotors.map(rotorReport),
    stages: a.stages,
    fit: a.fit,
    warnings,
  };
}

function rotorReport(rotor: RotorTraits): object {
  return {
    blades: rotor.blades,
    hand: rotor.hand,
    tipDiameterMm: rotor.tipDiameterMm,
    sweptDiameterMm: rotor.sweptDiameterMm,
    hubDiameterMm: rotor.hubDiameterMm,
    axialDepthMm: rotor.axialDepthMm,
    shroud: rotor.shroud,
    stations: rotor.stations,
    massG: rotor.massG,
    staticUnbalanceGmm: rotor.staticUnbalanceGmm,
    coupleUnbalanceGmm2: rotor.coupleUnbalanceGmm2,
    balanceGrade: rotor.balanceGrade,
    tipSpeedMs: rotor.tipSpeedMs,
    hoopMpa: rotor.hoopMpa,
    rootMpa: rotor.rootMpa,
    confidence: rotor.confidence,
  };
}
