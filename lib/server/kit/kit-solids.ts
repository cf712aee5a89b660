import { publicDb } from "@/db/client/handles";
import { shownKeepOutFile } from "@/db/queries/shown/fit";
import type { KitSolid } from "@/lib/contracts/kit";
import { ExpectedError } from "@/lib/domain/expected-error";
import { boxAsMesh } from "@/lib/science/geometry/fit/keep-out";
import type { Mesh } from "@/lib/science/geometry/mesh";
import { joinMeshes, writeBinaryStl } from "@/lib/science/geometry/stl-write";
import { asLocalFile } from "@/lib/services/quarantine/quarantine";
import { storage } from "@/lib/services/storage/from-env";
import { readMeshAlone } from "../designs/read-mesh-alone";
import { kitFileName } from "./kit-drawing";
import { kitSolidOf, readKit } from "./read-kit";

export interface StlFile {
  name: string;
  bytes: Uint8Array<ArrayBuffer>;
}

const where = "cooler coordinates, mm";

async function meshOf({ id, name, minMm, maxMm }: KitSolid): Promise<Mesh> {
  if (minMm && maxMm) return boxAsMesh({ min: minMm, max: maxMm });
  const file = await shownKeepOutFile(publicDb(), { keepOutId: id });
  if (!file) throw new ExpectedError("gone", `The file of ${name} was taken down.`);
  const { body } = await storage().get(file.storageKey);
  // Solids are kept in mm, whatever their size makes one guess.
  return asLocalFile(body, (path) => readMeshAlone(path, 1));
}

/** One keep-out solid as a binary STL in cooler coordinates, mm. */
export async function kitSolidStl(asked: { slug: string; id: string }): Promise<StlFile> {
  const { kit, solid } = await kitSolidOf(asked);
  const bytes = writeBinaryStl(await meshOf(solid), `${solid.name}, ${where}`);
  return { name: kitFileName(kit, solid.name, "stl"), bytes };
}

/** All solids around the season's cooler in one STL. */
export async function kitSolidsStl(asked: { slug: string }): Promise<StlFile> {
  const kit = await readKit(asked);
  const meshes: Mesh[] = [];
  for (const solid of kit.solids) meshes.push(await meshOf(solid));
  return {
    name: kitFileName(kit, "keep-outs", "stl"),
    bytes: writeBinaryStl(joinMeshes(meshes), `Keep-outs of ${kit.season.title}, ${where}`),
  };
}
