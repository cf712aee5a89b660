import { Refusal } from "@/lib/science/refusal";
import { GrowingFloats } from "./growing";
import type { Mesh } from "./mesh";
import type { ByteSource, MeshWarning, ReadingWatch } from "./reading";
import { ModelPartParser, type ModelObject, type ModelUse } from "./three-mf-model";
import { composeTransforms, determinant, identityTransform, transformPoint, type Transform } from "./transform";
import { VertexWeld } from "./weld";
import { zipDirectory, zipEntryBytes, type ZipEntry } from "./zip-container";

const MODEL_TYPE = "http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel";
const RELATIONSHIP_BYTES_MAX = 262_144;
const USE_DEPTH_MAX = 16;
const USES_MAX = 10_000;

/** Millimetres in one unit of a 3MF model (3MF Core 1.4.0, §3.4). */
const MM_PER_UNIT: Readonly<Record<string, number>> = {
  micron: 0.001,
  millimeter: 1,
  centimeter: 10,
  inch: 25.4,
  foot: 304.8,
  meter: 1000,
};

/** What a 3MF file holds: all build items in one mesh, in the file's own unit. */
export interface ThreeMfReading {
  readonly mesh: Mesh;
  readonly mmPerUnit: number;
  readonly unitName: string;
  readonly objects: number;
  readonly warnings: MeshWarning[];
}

interface ModelPackage {
  readonly parts: Map<string, ModelPartParser>;
  readonly main: string;
}

/**
 * Reads a 3MF package: the model is found by its relationship, every build item is placed by its transforms and
 * components are followed; a mirroring transform has its triangles turned back. Coordinates stay in the file's unit.
 * Throws a Refusal for zip bombs, entities, cycles, missing parts and meshes that aren't ones.
 */
export async function readThreeMf(source: ByteSource, watch: ReadingWatch): Promise<ThreeMfReading> {
  const entries = new Map((await zipDirectory(source)).map((entry) => [entry.name.toLowerCase(), entry]));
  const spent = { bytes: 0 };
  const load = async (name: string): Promise<ModelPartParser> => {
    const entry = entries.get(name.toLowerCase());
    if (!entry) throw new Refusal("3mf-part", `The 3MF file lacks its part ${name.slice(0, 80)}.`);
    return parsePart(source, entry, watch, spent);
  };
  const main = await mainModelName(source, entries, watch, spent);
  const parts = new Map<string, ModelPartParser>([[main, await load(main)]]);
  for (let added = true; added;) {
    added = false;
    for (const path of [...parts.values()].flatMap(pathsUsed)) {
      if (parts.has(path)) continue;
      parts.set(path, await load(path));
      added = true;
    }
  }
  return assemble({ parts, main }, watch);
}

const pathsUsed = (part: ModelPartParser): string[] =>
  [...part.items, ...[...part.objects.values()].flatMap((object) => object.components)].flatMap(
    (use) => use.path ?? [],
  );

async function mainModelName(
  source: ByteSource,
  entries: Map<string, ZipEntry>,
  watch: ReadingWatch,
  spent: { bytes: number },
): Promise<string> {
  const entry = entries.get("_rels/.rels");
  if (!entry) throw new Refusal("not-3mf", "The file is a zip, but not a 3MF model.");
  let text = "";
  const decoder = new TextDecoder();
  for await (const bytes of zipEntryBytes(source, entry, watch, spent)) {
    text += decoder.decode(bytes, { stream: true });
    if (text.length > RELATIONSHIP_BYTES_MAX) throw new Refusal("3mf-part", "The list of relationships is too long.");
  }
  if (/<!DOCTYPE|<!ENTITY/i.test(text))
    throw new Refusal("xml-doctype", "The 3MF file declares XML entities, which is refused.");
  for (const [tag] of text.matchAll(/<[^<>]{0,2000}>/g)) {
    if (!tag.includes(`"${MODEL_TYPE}"`) && !tag.includes(`'${MODEL_TYPE}'`)) continue;
    const target = /\bTarget\s*=\s*(?:"([^"]*)"|'([^']*)')/.exec(tag);
    const name = target?.[1] ?? target?.[2];
    if (name !== undefined) return name.replace(/^\.?\//, "");
  }
  throw new Refusal("not-3mf", "The file is a zip, but not a 3MF model.");
}

async function parsePart(
  source: ByteSource,
  entry: ZipEntry,
  watch: ReadingWatch,
  spent: { bytes: number },
): Promise<ModelPartParser> {
  const parser = new ModelPartParser();
  const decoder = new TextDecoder();
  for await (const bytes of zipEntryBytes(source, entry, watch, spent)) {
    parser.feed(decoder.decode(bytes, { stream: true }));
    watch.step(parser.triangles);
  }
  parser.feed(decoder.decode());
  parser.close();
  return parser;
}

class Assembly {
  readonly triangles = new GrowingFloats();
  readonly weld = new VertexWeld();
  uses = 0;

  constructor(
    private readonly pack: ModelPackage,
    private readonly watch: ReadingWatch,
  ) {}

  place(use: ModelUse, partName: string, outer: Transform, depth: number): void {
    const name = use.path ?? partName;
    const object = this.pack.parts.get(name)?.objects.get(use.objectId);
    if (!object)
      throw new Refusal("3mf-object", `The 3MF file uses an object that isn't there (${use.objectId.slice(0, 20)}).`);
    if (depth > USE_DEPTH_MAX || ++this.uses > USES_MAX) {
      throw new Refusal("3mf-components", "The 3MF file's components contain each other or are too many.");
    }
    const transform = composeTransforms(use.transform, outer);
    this.add(object, transform);
    for (const component of object.components) this.place(component, name, transform, depth + 1);
  }

  private add(object: ModelObject, transform: Transform): void {
    const { positions, triangles } = object;
    const total = (this.triangles.length + triangles.length) / 3;
    this.watch.step(total);
    const mirrored = determinant(transform) < 0;
    const vertex = (corner: number): number => {
      const start = 3 * triangles.get(corner);
      const [x, y, z] = transformPoint(
        transform,
        positions.get(start),
        positions.get(start + 1),
        positions.get(start + 2),
      );
      return this.weld.add(x, y, z);
    };
    for (let i = 0; i < triangles.length; i += 3) {
      const [a, b, c] = [vertex(i), vertex(i + 1), vertex(i + 2)];
      this.triangles.push3(a, mirrored ? c : b, mirrored ? b : c);
    }
  }
}

function assemble(pack: ModelPackage, watch: ReadingWatch): ThreeMfReading {
  const main = pack.parts.get(pack.main);
  const unitName = main?.unit ?? "millimeter";
  const mmPerUnit = MM_PER_UNIT[unitName];
  if (!main || mmPerUnit === undefined)
    throw new Refusal("3mf-unit", `The 3MF file's unit “${unitName.slice(0, 20)}” is not known.`);
  const warnings: MeshWarning[] = [];
  let items: ModelUse[] = main.items;
  if (items.length === 0) {
    items = [...main.objects.values()].map(({ id }) => ({
      objectId: id,
      path: undefined,
      transform: identityTransform,
    }));
    if (items.length > 0)
      warnings.push({ code: "3mf-no-build", message: "The 3MF file builds nothing; all its objects were read." });
  }
  const assembly = new Assembly(pack, watch);
  for (const item of items) assembly.place(item, pack.main, identityTransform, 0);
  if (assembly.triangles.length === 0) throw new Refusal("empty", "The 3MF file holds no triangles.");
  const mesh = { triangles: assembly.triangles.toUint32(), positions: assembly.weld.finish() };
  return { mesh, mmPerUnit, unitName, objects: items.length, warnings };
}
