import type { Knex } from "knex";
import { afterAll, beforeAll, describe, expect, inject, it } from "vitest";
import { connect } from "@/db/client/connect";
import { revisionFiles, rotorTraitNames, type RevisionFiles } from "@/lib/contracts/revision-files";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { binaryStl, boxMesh, insideOut, together, tubeMesh, withoutTriangles } from "../factories/rotor-mesh";
import { draftRevision } from "../setup/draft-revision";
import { signInAs, type Session } from "../setup/session";
import { begin, outcome, sendByTus } from "../setup/uploading";

let owner: Knex;
let designer: Session;
let draft: { revisionId: string; slug: string };
const address = (part: string) => `/api/v1/my/designs/${draft.slug}/revisions/A/${part}`;

beforeAll(async () => {
  owner = connect(inject("server").urls.owner);
  designer = await signInAs("designer");
  draft = await draftRevision(owner, "designer@alder.example");
});
afterAll(() => owner.destroy());

/** Nine right-handed blades to 56 mm about a hub of 20 mm, 24 mm deep: what the model is drawn with. */
const drawn = { blades: 9, hand: "right", hubRadiusMm: 20, tipRadiusMm: 56, hubDepthMm: 24 } as const;
const model = (): Uint8Array =>
  binaryStl(generateRotor({ ...drawn, helixPitchMm: 90, chordMm: 26, thicknessMm: 2 }), "a rotor for a draft");

async function send(bytes: Uint8Array, name = "rotor.stl") {
  const about = { purpose: "model", subjectId: draft.revisionId, name, bytes: bytes.length } as const;
  const { uploadId, address: to } = await begin(designer, about);
  await sendByTus(designer, { address: to, bytes });
  return outcome(designer, uploadId);
}
const files = async (): Promise<RevisionFiles> =>
  revisionFiles.parse(await (await designer.fetch(address("files"))).json());
const allRead = () => Object.fromEntries(rotorTraitNames.map((name) => [name, { from: "read" }]));
const whole = { spacerMm: { from: "declared", value: 0 }, struts: { from: "declared", value: 3 } };

describe("a model sent for a draft", () => {
  it("is measured in the job: what it was drawn with stands beside what was declared", async () => {
    expect(await send(model())).toMatchObject({ state: "read", progress: { stage: "done", measured: true } });
    const { reading, rotors } = await files();
    expect(reading).toMatchObject({ name: "rotor.stl", unit: { mmPerUnit: 1, from: "guessed" } });
    const [rotor] = rotors;
    expect(rotor?.traits.blades).toEqual({ read: drawn.blades, declared: 5, holds: null });
    expect(rotor?.traits.hand).toEqual({ read: drawn.hand, declared: "left", holds: null });
    expect(Number(rotor?.traits.tipDiameterMm?.read)).toBeCloseTo(2 * drawn.tipRadiusMm, 0);
    expect(Number(rotor?.traits.hubDiameterMm?.read)).toBeCloseTo(2 * drawn.hubRadiusMm, 0);
    expect(await owner("mesh_reading").where({ reader_version: reading?.readerVersion })).not.toEqual([]);
  });

  it("has its traits confirmed one by one: read ones from the stored reading, others as declared", async () => {
    const { reading } = await files();
    const rotors = [{ ...allRead(), hubDiameterMm: { from: "declared", value: 41.5 } }];
    const body = { attachmentId: reading?.attachmentId, whole, rotors };
    expect((await designer.send("PUT", address("traits"), body)).status).toBe(204);
    const [row] = await owner("rotor").where({ revision_id: draft.revisionId });
    expect(row).toMatchObject({ blades: 9, hand: "right", hub_diameter_mm: 41.5 });
    expect(row.holds).toMatchObject({ blades: "read", hub_diameter: "declared", tip_diameter: "read" });
    expect(row.traits_read.hubDiameterMm).toBeCloseTo(2 * drawn.hubRadiusMm, 0);
    expect(row.traits_declared).toMatchObject({ hubDiameterMm: 41.5 });
    const trait = await owner("revision_trait").where({ revision_id: draft.revisionId }).first();
    expect([trait.stages, trait.struts, trait.holds.struts]).toEqual([1, 3, "declared"]);
    const traits = (await files()).rotors[0]?.traits;
    expect([traits?.blades?.holds, traits?.hubDiameterMm?.holds]).toEqual(["read", "declared"]);
  });

  it("refuses what wasn't read, what can't be, and a file that is no longer the one that was read", async () => {
    const { reading } = await files();
    const put = (change: object) =>
      designer.send("PUT", address("traits"), {
        ...{ attachmentId: reading?.attachmentId, whole, rotors: [allRead()] },
        ...change,
      });
    const unread = await put({ whole: { ...whole, spacerMm: { from: "read" } } });
    expect(unread.status).toBe(400);
    expect(await unread.json()).toMatchObject({ fields: [{ path: "whole.spacerMm" }] });
    const wide = await put({ rotors: [{ ...allRead(), hubDiameterMm: { from: "declared", value: 200 } }] });
    expect(await wide.json()).toMatchObject({ code: "malformed", fields: [{ path: "rotors[0].hubDiameterMm" }] });
    expect((await put({ attachmentId: draft.revisionId })).status).toBe(409);
    const member = await signInAs("member");
    expect((await member.fetch(address("files"))).status).toBe(404);
  });
});

describe("a model that can't be measured", () => {
  it("is refused with the reader's reason", async () => {
    const lying = model();
    new DataView(lying.buffer, lying.byteOffset).setUint32(80, 4_000_000_000, true);
    expect((await send(lying)).state).toBe("refused");
    const notNumbers = model();
    new DataView(notNumbers.buffer, notNumbers.byteOffset).setFloat32(84 + 12, Number.NaN, true);
    const refused = await send(notNumbers);
    expect(refused.state).toBe("refused");
    expect(refused.reason).toMatch(/number|finite/i);
    expect(await send(binaryStl(withoutTriangles(boxMesh([0, 0, 0], [1, 1, 1]), [...Array(12).keys()])))).toMatchObject(
      {
        state: "refused",
        attachmentId: null,
      },
    );
  });

  it("but is a mesh all the same is kept, and nothing is made up of it", async () => {
    expect((await send(binaryStl(insideOut(boxMesh([0, 0, 0], [80, 40, 20])), "a bracket"), "bracket.stl")).state).toBe(
      "read",
    );
    const { reading } = await files();
    expect([reading?.name, reading?.confidence]).toEqual(["bracket.stl", null]);
  });

  it("as STEP is kept for download and not measured", async () => {
    const step = Buffer.from("ISO-10303-21;\nHEADER;\nENDSEC;\nDATA;\nENDSEC;\nEND-ISO-10303-21;\n");
    const { state, progress, attachmentId } = await send(step, "rotor.step");
    expect([state, progress.measured]).toEqual(["read", false]);
    const served = await designer.fetch(`/api/v1/files/${attachmentId}`);
    expect([served.status, served.headers.get("content-type")]).toEqual([200, "model/step"]);
  });
});

describe("what stands still beside a rotor", () => {
  it("is read, and an inlet stack holds with its kind and length together", async () => {
    const rotor = generateRotor({ ...drawn, helixPitchMm: 90, chordMm: 22, thicknessMm: 2 });
    expect((await send(binaryStl(together(rotor, tubeMesh(58, 61, 16, 41, 160))), "stack.stl")).state).toBe("read");
    const { reading, whole: lines } = await files();
    expect(reading?.sure.inletStack).toBeGreaterThan(0.7);
    expect(lines.inletStack).toMatchObject({ read: "straight", declared: "none" });
    expect(Number(lines.inletStackMm?.read)).toBeCloseTo(25, 1);
    const put = (inlet: object) =>
      designer.send("PUT", address("traits"), {
        ...{ attachmentId: reading?.attachmentId, whole: { ...whole, ...inlet }, rotors: [allRead()] },
      });
    const torn = await put({ inletStack: { from: "read" }, inletStackMm: { from: "declared", value: 0 } });
    expect(await torn.json()).toMatchObject({ code: "malformed", fields: [{ path: "whole.inletStackMm" }] });
    expect((await put({ inletStack: { from: "read" }, inletStackMm: { from: "read" } })).status).toBe(204);
    const trait = await owner("revision_trait").where({ revision_id: draft.revisionId }).first();
    expect([trait.inlet_stack, trait.holds.inlet_stack, trait.holds.inlet_stack_length]).toEqual([
      ...["straight", "read", "read"],
    ]);
    expect(trait.inlet_stack_mm).toBeCloseTo(25, 1);
  });
});
