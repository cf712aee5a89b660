import { randomBytes } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { problemSchema } from "@/lib/contracts/base";
import { benchSetup } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { writeBinaryStl } from "@/lib/science/geometry/stl-write";
import { boxMesh } from "../factories/rotor-mesh";
import { signInAs, type Session } from "../setup/session";

let host: Session;
let operator: Session;
let versionId: string;

const idOf = async (answer: Response): Promise<string> => {
  expect(answer.status, await answer.clone().text()).toBe(201);
  return made.parse(await answer.json()).id;
};
const refusal = async (answer: Response) => {
  const { code, status, fields } = problemSchema.parse(await answer.json());
  return { code, status, paths: fields.map(({ path }) => path) };
};

beforeAll(async () => {
  host = await signInAs("host");
  operator = await signInAs("operator");
  const slug = `solids-${randomBytes(4).toString("hex")}`;
  const benchId = await idOf(await host.send("POST", "/api/v1/host/benches", { slug, name: slug }));
  const version = {
    ...{ cooler: "tower", heatSource: "block with a thermal cut-out", temperatureSensors: "two thermistors" },
    ...{ microphone: "class 2", calibrator: "94 dB", changeReason: "A test of solids." },
  };
  versionId = await idOf(await host.send("POST", `/api/v1/host/benches/${benchId}/versions`, version));
});

const box = { name: "Memory", minMm: [62, -70, -45], maxMm: [70, 70, 8] };
const addBox = (body: unknown, by = host) =>
  by.send("POST", `/api/v1/host/bench-versions/${versionId}/keep-outs`, body);

describe("a bench version's solids", () => {
  it("take a box, name the field that is wrong, and let it go again", async () => {
    const id = await idOf(await addBox(box));
    expect(await refusal(await addBox(box))).toEqual({ code: "already_there", status: 409, paths: ["name"] });
    const flat = await refusal(await addBox({ ...box, name: "Flat", maxMm: [70, -70, 8] }));
    expect(flat).toEqual({ code: "malformed", status: 400, paths: ["maxMm"] });
    const two = await refusal(await addBox({ ...box, name: "Two", minMm: [1, 2] }));
    expect(two).toEqual({ code: "malformed", status: 400, paths: ["minMm"] });
    expect((await addBox({ ...box, name: "Mine" }, operator)).status).toBe(403);
    expect((await host.send("DELETE", `/api/v1/host/keep-outs/${id}`)).status).toBe(204);
    expect((await host.send("DELETE", `/api/v1/host/keep-outs/${id}`)).status).toBe(404);
  });

  it("take a mesh by its file and the unit that is said of it", async () => {
    const address = `/api/v1/host/bench-versions/${versionId}/keep-out-meshes`;
    const send = (query: string, content: Uint8Array<ArrayBuffer>) =>
      host.fetch(`${address}?${query}`, {
        method: "POST",
        headers: { "content-type": "application/octet-stream" },
        body: content,
      });
    const block = writeBinaryStl(boxMesh([-1, -2, -3], [4, 1, 2]), "block");
    expect(await refusal(await send("name=Fins", block))).toMatchObject({ status: 400, paths: ["unit"] });
    expect(await refusal(await send("name=Fins&unit=m", block))).toMatchObject({ status: 400, paths: ["unit"] });
    const cut = await refusal(await send("name=Fins&unit=cm", block.slice(0, 200)));
    expect(cut).toMatchObject({ status: 400, paths: ["file"] });
    await idOf(await send("name=Fins&unit=cm", block));
  });

  it("stand once a season opened on the version", async () => {
    const setup = benchSetup.parse(await (await host.fetch("/api/v1/host/benches")).json());
    const used = setup.benches
      .flatMap((bench) => bench.versions)
      .find(({ budgets }) => budgets.some(({ frozenAt }) => frozenAt !== null));
    const answer = await host.send("POST", `/api/v1/host/bench-versions/${used?.id}/keep-outs`, box);
    expect(await refusal(answer)).toMatchObject({ code: "moved_on", status: 409 });
  });
});

describe("frames", () => {
  const word = randomBytes(4).toString("hex");
  const frame = {
    ...{ frameClass: "140", outerMm: 140, depthMm: 25, boreMm: 134, holeSpacingMm: 124.5 },
    ...{ holeDiameterMm: 4.3, toleranceMm: 0.5, word },
  };

  it("are added and changed until something stands on them; a wrong figure is named by its field", async () => {
    const id = await idOf(await host.send("POST", "/api/v1/host/frames", frame));
    expect(await refusal(await host.send("POST", "/api/v1/host/frames", frame))).toMatchObject({
      code: "already_there",
      paths: ["word"],
    });
    const wide = await refusal(await host.send("PUT", `/api/v1/host/frames/${id}`, { ...frame, boreMm: 141 }));
    expect(wide).toMatchObject({ status: 400, paths: expect.arrayContaining(["boreMm"]) });
    expect((await host.send("PUT", `/api/v1/host/frames/${id}`, { ...frame, boreMm: 133 })).status).toBe(204);
    expect((await operator.send("PUT", `/api/v1/host/frames/${id}`, frame)).status).toBe(403);
    const setup = benchSetup.parse(await (await host.fetch("/api/v1/host/benches")).json());
    const used = setup.frames.find(({ key }) => key === "120x25");
    const change = { ...frame, frameClass: "120", outerMm: 120, boreMm: 110, holeSpacingMm: 105, word: "" };
    expect(await refusal(await host.send("PUT", `/api/v1/host/frames/${used?.id}`, change))).toMatchObject({
      code: "moved_on",
      status: 409,
    });
  });
});
