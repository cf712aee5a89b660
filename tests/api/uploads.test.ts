import { randomBytes } from "node:crypto";
import type { Knex } from "knex";
import { afterAll, beforeAll, describe, expect, inject, it } from "vitest";
import { connect } from "@/db/client/connect";
import { uploadPurposes } from "@/lib/contracts/uploads";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { binaryStl } from "../factories/rotor-mesh";
import { draftRevision } from "../setup/draft-revision";
import { signedOut, signInAs, type Session } from "../setup/session";
import { announce, ask, begin, outcome, patch, sendByTus } from "../setup/uploading";

let owner: Knex;
let designer: Session;
let member: Session;
let subjectId: string;

beforeAll(async () => {
  owner = connect(inject("server").urls.owner);
  [designer, member] = await Promise.all([signInAs("designer"), signInAs("member")]);
  ({ revisionId: subjectId } = await draftRevision(owner, "designer@alder.example"));
});
afterAll(() => owner.destroy());

/** Bytes that no other test sends. */
const text = (length: number): Uint8Array => Buffer.from(randomBytes(length).toString("hex").slice(0, length));
const rotor = (blades: number): Uint8Array =>
  binaryStl(
    generateRotor({
      ...{ blades, hand: "right", helixPitchMm: 90, chordMm: 30, thicknessMm: 2 },
      ...{ hubRadiusMm: 20, tipRadiusMm: 56, hubDepthMm: 24 },
    }),
    randomBytes(8).toString("hex"),
  );

describe("an announced upload", () => {
  it("comes in pieces, is broken off in mid-piece, goes on where it stood and is kept as it was sent", async () => {
    const bytes = text(5_500_000);
    const { uploadId, address } = await begin(designer, { purpose: "source", subjectId, bytes: bytes.length });
    const acknowledged = await sendByTus(designer, { address, bytes, breakAfter: 2_500_000 });
    expect(acknowledged).toBeLessThan(bytes.length);
    const stands = Number((await ask(designer, address)).headers.get("upload-offset"));
    expect(stands).toBeGreaterThanOrEqual(acknowledged);
    expect(stands).toBeLessThan(bytes.length);
    expect(await sendByTus(designer, { address, bytes })).toBe(bytes.length);
    const { state, attachmentId, sentBytes } = await outcome(designer, uploadId);
    expect([state, sentBytes]).toEqual(["read", bytes.length]);
    const kept = await designer.fetch(`/api/v1/files/${attachmentId}`);
    expect(Buffer.from(await kept.arrayBuffer()).equals(Buffer.from(bytes))).toBe(true);
  });

  it("speaks the protocol: version, offset and length in the answers, no cache (tus 1.0.0, core protocol)", async () => {
    const bytes = text(100);
    const { address } = await begin(designer, { purpose: "source", subjectId, bytes: bytes.length });
    const first = await patch(designer, address, 0, bytes.subarray(0, 60));
    expect([first.status, first.headers.get("upload-offset"), first.headers.get("tus-resumable")]).toEqual([
      204,
      "60",
      "1.0.0",
    ]);
    const head = await ask(designer, address);
    expect([head.status, head.headers.get("upload-offset"), head.headers.get("upload-length")]).toEqual([
      200,
      "60",
      "100",
    ]);
    expect(head.headers.get("cache-control")).toContain("no-store");
    expect((await patch(designer, address, 0, bytes)).status).toBe(409);
    expect((await designer.fetch(address, { method: "HEAD" })).status).toBe(412);
    expect(head.headers.get("access-control-allow-origin")).toBeNull();
  });

  it("takes no byte more than was announced", async () => {
    const bytes = text(200);
    const { uploadId, address } = await begin(designer, { purpose: "source", subjectId, bytes: 150 });
    const over = await patch(designer, address, 0, bytes);
    expect(over.status).toBeGreaterThanOrEqual(400);
    expect(
      (await patch(designer, address, Number((await ask(designer, address)).headers.get("upload-offset")), bytes)).ok,
    ).toBe(false);
    const row = await owner("upload").where({ id: uploadId }).first("state");
    expect(row.state).toBe("sending");
  });

  it("is nobody else's: their piece, their question and their cancelling find nothing", async () => {
    const { uploadId, address } = await begin(designer, { purpose: "source", subjectId, bytes: 10 });
    const answers = await Promise.all([
      patch(member, address, 0, text(10)),
      ask(member, address),
      member.fetch(`/api/v1/uploads/${uploadId}`),
      member.send("DELETE", `/api/v1/uploads/${uploadId}`),
      patch(member, "/api/v1/uploads/tus/0123456789abcdef0123456789abcdef0123456789abcdef", 0, text(10)),
    ]);
    expect(answers.map((each) => each.status)).toEqual([404, 404, 404, 404, 404]);
    expect((await patch(signedOut(), address, 0, text(10))).status).toBe(401);
    expect((await ask(designer, address)).headers.get("upload-offset")).toBe("0");
  });

  it("refuses a second use of its address, and still tells a sender who missed the end that all is there", async () => {
    const bytes = text(40);
    const { uploadId, address } = await begin(designer, { purpose: "source", subjectId, bytes: 40 });
    await sendByTus(designer, { address, bytes });
    await outcome(designer, uploadId);
    expect((await patch(designer, address, 0, bytes)).status).toBe(404);
    expect((await patch(designer, address, 40, bytes)).status).toBe(404);
    expect((await ask(designer, address)).headers.get("upload-offset")).toBe("40");
    expect((await designer.send("DELETE", `/api/v1/uploads/${uploadId}`)).status).toBe(409);
  });

  it("is cancelled by its sender, and takes nothing from then on", async () => {
    const { uploadId, address } = await begin(designer, { purpose: "source", subjectId, bytes: 40 });
    await patch(designer, address, 0, text(20));
    expect((await designer.send("DELETE", `/api/v1/uploads/${uploadId}`)).status).toBe(204);
    expect((await patch(designer, address, 20, text(20))).status).toBe(404);
    expect(await outcome(designer, uploadId)).toMatchObject({ state: "refused", reason: "It was cancelled." });
  });

  it("is refused from another site's page", async () => {
    const { address } = await begin(designer, { purpose: "source", subjectId, bytes: 10 });
    const foreign = await designer.fetch(address, { method: "PATCH", headers: { origin: "https://evil.example" } });
    expect(foreign.status).toBe(403);
  });
});

describe("announcing", () => {
  it("refuses what is too large with 413 and the field", async () => {
    const bytes = uploadPurposes.model.maxBytes + 1;
    const answer = await announce(designer, { purpose: "model", subjectId, bytes });
    expect(answer.status).toBe(413);
    expect(await answer.json()).toMatchObject({ code: "too_large", fields: [{ path: "bytes" }] });
  });

  it("answers somebody else's revision like one that isn't there", async () => {
    const nowhere = { purpose: "model", subjectId: "00000000-0000-7000-8000-000000000000", bytes: 10 } as const;
    const [others, none] = await Promise.all([announce(member, { ...nowhere, subjectId }), announce(member, nowhere)]);
    const words = async (answer: Response) => ({ ...((await answer.json()) as object), requestId: "" });
    expect([others.status, none.status]).toEqual([404, 404]);
    expect(await words(others)).toEqual(await words(none));
  });

  it("lets members send no logs of the bench", async () => {
    expect((await announce(member, { purpose: "log", subjectId, bytes: 10 })).status).toBe(403);
  });
});

describe("a file that is all there", () => {
  it("is refused by its content, whatever its name says, with what would be taken", async () => {
    const page = Buffer.from("<html><script>alert(1)</script></html>");
    const { uploadId, address } = await begin(designer, {
      ...{ purpose: "model", subjectId, name: "rotor.stl", bytes: page.length },
    });
    await sendByTus(designer, { address, bytes: page });
    const { state, reason, attachmentId } = await outcome(designer, uploadId);
    expect(state).toBe("refused");
    expect(reason).toMatch(/text; taken are stl, 3mf, step/);
    expect(attachmentId).toBeNull();
  });

  it("gets the same answers whether another person sent the same content before or not", async () => {
    const known = rotor(7);
    const theirs = await draftRevision(owner, "member@alder.example");
    const answers = [];
    for (const [who, subject, bytes] of [
      [designer, subjectId, known],
      [member, theirs.revisionId, known],
      [member, theirs.revisionId, rotor(7)],
    ] as const) {
      const { uploadId, address } = await begin(who, { purpose: "model", subjectId: subject, bytes: bytes.length });
      await sendByTus(who, { address, bytes });
      const { attachmentId, uploadId: _own, createdAt, ...rest } = await outcome(who, uploadId);
      // An id holds its time: one from before this upload would tell of another's.
      expect(Number.parseInt(String(attachmentId).replace("-", "").slice(0, 12), 16)).toBeGreaterThanOrEqual(
        Date.parse(createdAt),
      );
      answers.push(rest);
    }
    expect(answers[1]).toEqual(answers[0]);
    expect(answers[2]).toEqual(answers[0]);
    expect(answers[0]).toMatchObject({ state: "read", progress: { stage: "done", kind: "stl", measured: true } });
  });
});
