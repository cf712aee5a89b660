import { createReadStream } from "node:fs";
import { stat } from "node:fs/promises";
import { Readable } from "node:stream";
import { appDb } from "@/db/client/handles";
import { fileOfContent, takenDownReason } from "@/db/queries/uploads";
import { keepOutFileMaxBytes, keepOutUnits, type NewKeepOutMesh } from "@/lib/contracts/keep-outs";
import { ExpectedError } from "@/lib/domain/expected-error";
import { meshBounds, type Bounds } from "@/lib/science/geometry/mesh";
import { writeBinaryStl } from "@/lib/science/geometry/stl-write";
import { Refusal } from "@/lib/science/refusal";
import { asLocalFile } from "@/lib/services/quarantine/quarantine";
import type { Asked } from "../audit/audit";
import { chunksOf } from "../bench/spool-log";
import { readMeshAlone } from "../designs/read-mesh-alone";
import { demand } from "../permission";
import { contentOf, keepContent, type Content } from "../uploads/content";
import { addSolid, demandRoom } from "./keep-outs";

/** How far from the mounting face's middle a solid may reach, mm; as for boxes. */
const reachMaxMm = 1000;
/** A solid that is smaller than this all over was given in a larger unit than its own, mm. */
const sizeMinMm = 1;

const tooLarge = () =>
  new ExpectedError(
    "too_large",
    `A solid's file may have ${keepOutFileMaxBytes / 1_000_000} MB. Make its mesh coarser.`,
    [{ path: "file", message: "is too large" }],
  );
const wrongFile = (message: string) =>
  new ExpectedError("malformed", `The file can't be taken: ${message}`, [{ path: "file", message }]);

/**
 * Adds a solid by its model file, in the unit that was said. The file is read in a thread; kept is its mesh in mm as a
 * binary STL, under its SHA-256 as every file is, so that its unit is asked once.
 * @throws ExpectedError as addKeepOutBox, and wrong_kind, too_large, malformed with what the reader says of the file
 */
export async function addKeepOutMesh(
  asked: Asked,
  { benchVersionId, said, request }: { benchVersionId: string; said: NewKeepOutMesh; request: Request },
): Promise<{ id: string }> {
  const { actor } = asked;
  demand(actor, "bench.manage");
  await demandRoom(appDb(), { benchVersionId, name: said.name });
  const kind = request.headers.get("content-type")?.split(";")[0]?.trim().toLowerCase();
  if (kind !== "application/octet-stream")
    throw new ExpectedError("wrong_kind", "Send the file as application/octet-stream.");
  if (Number(request.headers.get("content-length") ?? 0) > keepOutFileMaxBytes) throw tooLarge();
  const { bounds, content } = await asLocalFile(Readable.from(bounded(request.body)), (file) => readSolid(file, said));
  const storageKey = await keepContent(content);
  return appDb().transaction(async (tx) => {
    const file = { sha256: content.sha256, bytes: content.bytes, kind: content.kind, storageKey };
    const fileId = await fileOfContent(tx, { ...file, receivedFrom: actor.personId });
    const { name, note } = said;
    const extent = { extentMinMm: [...bounds.min], extentMaxMm: [...bounds.max] };
    return addSolid(tx, asked, { benchVersionId, shape: "mesh", name, note, fileId, ...extent });
  });
}

async function* bounded(body: ReadableStream<Uint8Array> | null): AsyncGenerator<Uint8Array> {
  let bytes = 0;
  for await (const piece of chunksOf(body)) {
    bytes += piece.byteLength;
    if (bytes > keepOutFileMaxBytes) throw tooLarge();
    yield piece;
  }
}

async function readSolid(file: string, { unit }: NewKeepOutMesh): Promise<{ bounds: Bounds; content: Content }> {
  const sent = await contentOf(async () => createReadStream(file), (await stat(file)).size);
  if (sent.kind !== "stl" && sent.kind !== "3mf")
    throw wrongFile(
      `by its content it is ${sent.kind === "unknown" ? "of no known kind" : sent.kind}; taken are stl, 3mf.`,
    );
  if (sent.kind === "stl" && unit === "file") {
    const fields = [{ path: "unit", message: "is needed: an STL names none" }];
    throw new ExpectedError("malformed", "An STL names no unit: say which it was drawn in.", fields);
  }
  await demandNotTakenDown(sent);
  const mesh = await readMeshAlone(file, keepOutUnits[unit]).catch((error: unknown) => {
    throw error instanceof Refusal ? wrongFile(error.message) : error;
  });
  const bounds = meshBounds(mesh);
  if (!bounds) throw wrongFile("it holds no triangle.");
  demandSize(bounds);
  const bytes = writeBinaryStl(mesh, "Keep-out solid, cooler coordinates, mm");
  const content = await contentOf(async () => Readable.from([bytes]), bytes.length);
  await demandNotTakenDown(content);
  return { bounds, content };
}

async function demandNotTakenDown({ sha256 }: Content): Promise<void> {
  const gone = await takenDownReason(appDb(), { sha256 });
  if (gone !== undefined) throw wrongFile(`a file of this content was taken down: ${gone}`);
}

/** What a wrong unit does to a solid. */
function demandSize({ min, max }: Bounds): void {
  const reach = Math.max(...[...min, ...max].map(Math.abs));
  const size = Math.max(...max.map((high, axis) => high - (min[axis] ?? 0)));
  if (reach <= reachMaxMm && size >= sizeMinMm) return;
  const words =
    reach > reachMaxMm
      ? `reaches ${Math.round(reach)} mm away from the mounting face's middle, more than ${reachMaxMm} mm`
      : `is ${Number(size.toPrecision(2))} mm at its largest`;
  throw new ExpectedError("malformed", `In this unit the solid ${words}. Choose the unit that it was drawn in.`, [
    { path: "unit", message: `makes a solid that ${words}` },
  ]);
}
