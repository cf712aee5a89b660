import { createHash, randomBytes } from "node:crypto";
import type { Knex } from "knex";
import sharp from "sharp";
import { afterAll, beforeAll, describe, expect, inject, it } from "vitest";
import { connect } from "@/db/client/connect";
import { draftRevision } from "../setup/draft-revision";
import { signedOut, signInAs, type Session } from "../setup/session";
import { begin, outcome, sendByTus } from "../setup/uploading";

let owner: Knex;
let designer: Session;
let subjectId: string;

beforeAll(async () => {
  owner = connect(inject("server").urls.owner);
  designer = await signInAs("designer");
  ({ revisionId: subjectId } = await draftRevision(owner, "designer@alder.example"));
});
afterAll(() => owner.destroy());

async function upload(purpose: "photograph" | "print_profile", bytes: Uint8Array, to = subjectId) {
  const name = `${purpose} "1".txt`;
  const { uploadId, address } = await begin(designer, { purpose, subjectId: to, name, bytes: bytes.length });
  await sendByTus(designer, { address, bytes });
  return outcome(designer, uploadId);
}
const profile = (): Buffer => Buffer.from(`layer height 0.2 mm\n${randomBytes(20).toString("hex")}\n`);
const status = async (who: Session, id: string | null) => (await who.fetch(`/api/v1/files/${id}`)).status;

describe("a file of a draft", () => {
  it("is had by its owners and the staff alone, as a download of its own type that runs nothing", async () => {
    const bytes = profile();
    const { attachmentId } = await upload("print_profile", bytes);
    const people = [
      designer,
      await signInAs("operator"),
      await signInAs("host"),
      await signInAs("member"),
      signedOut(),
    ];
    expect(await Promise.all(people.map((who) => status(who, attachmentId)))).toEqual([200, 200, 200, 404, 404]);
    const answer = await designer.fetch(`/api/v1/files/${attachmentId}`);
    expect(Object.fromEntries(answer.headers)).toMatchObject({
      "content-type": "text/plain; charset=utf-8",
      "content-disposition": expect.stringMatching(/^attachment; filename="print_profile _1_.txt"/) as string,
      "x-content-type-options": "nosniff",
      "content-security-policy": "sandbox; default-src 'none'; frame-ancestors 'none'",
      etag: `"${createHash("sha256").update(bytes).digest("hex")}"`,
    });
    const part = await designer.fetch(`/api/v1/files/${attachmentId}`, { headers: { range: "bytes=6-11" } });
    expect([part.status, await part.text()]).toEqual([206, "height"]);
  });

  it("is taken off by its owners, until the revision is sent in", async () => {
    const draft = await draftRevision(owner, "designer@alder.example");
    const [first, second] = [
      await upload("print_profile", profile(), draft.revisionId),
      await upload("print_profile", profile(), draft.revisionId),
    ];
    const drop = async (who: Session, id: string | null) => (await who.send("DELETE", `/api/v1/files/${id}`)).status;
    expect(await drop(await signInAs("member"), first.attachmentId)).toBe(404);
    expect(await drop(designer, first.attachmentId)).toBe(204);
    expect(await status(designer, first.attachmentId)).toBe(404);
    await owner("revision").where({ id: draft.revisionId }).update({ sent_in_at: new Date() });
    expect(await drop(designer, second.attachmentId)).toBe(409);
    expect(await status(designer, second.attachmentId)).toBe(200);
  });
});

describe("a file of a published revision", () => {
  it("is had by everybody, and once taken down answers 410 with the day and the reason", async () => {
    const [entry] = await owner("published_entry").orderBy("entry_id").limit(1).select("revision_id");
    const sha256 = randomBytes(32).toString("hex");
    const [file] = await owner("file")
      .insert({ sha256, bytes: 3, kind: "text", state: "read", storage_key: `content/none/${sha256}` })
      .returning("id");
    const attachment = { revision_id: entry.revision_id, file_id: file.id, role: "print_profile", ordinal: 90 };
    await owner.raw("alter table attachment disable trigger attachment_fixed");
    const [attached] = await owner("attachment")
      .insert({ ...attachment, name: "profile.txt" })
      .returning("id");
    try {
      await owner("file")
        .where({ id: file.id })
        .update({ state: "taken_down", reason: "Not theirs to give.", taken_down_at: "2026-03-04T10:00:00Z" });
      for (const who of [signedOut(), designer]) {
        const answer = await who.fetch(`/api/v1/files/${attached.id}`);
        expect(answer.status).toBe(410);
        expect(await answer.json()).toMatchObject({
          code: "gone",
          detail: "This file was taken down on 2026-03-04: Not theirs to give.",
        });
      }
    } finally {
      await owner("attachment").where({ id: attached.id }).delete();
      await owner.raw("alter table attachment enable trigger attachment_fixed");
    }
  });

  it("of a content that was taken down isn't taken again", async () => {
    const bytes = profile();
    const sha256 = createHash("sha256").update(bytes).digest("hex");
    await owner("file").insert({
      ...{ sha256, bytes: bytes.length, kind: "text", state: "taken_down", storage_key: `content/none/${sha256}` },
      ...{ reason: "Not theirs to give.", taken_down_at: new Date() },
    });
    expect(await upload("print_profile", bytes)).toMatchObject({
      state: "refused",
      reason: "A file of this content was taken down: Not theirs to give.",
    });
  });
});

describe("a photograph", () => {
  it("is drawn anew: turned as the camera says, without place, time, camera or anything hidden in it", async () => {
    const secret = `hidden-${randomBytes(6).toString("hex")}`;
    const sent = await sharp({ create: { width: 60, height: 40, channels: 3, background: "#884422" } })
      .withExif({ IFD0: { Make: secret }, IFD3: { GPSLatitude: "51/1 30/1 0/1" } })
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer();
    expect(sent.includes(secret)).toBe(true);
    const { attachmentId } = await upload("photograph", Buffer.concat([sent, Buffer.from(secret)]));
    const kept = Buffer.from(await (await designer.fetch(`/api/v1/files/${attachmentId}`)).arrayBuffer());
    expect(kept.includes(secret)).toBe(false);
    const { exif, xmp, iptc, width, height, format } = await sharp(kept).metadata();
    expect([exif, xmp, iptc]).toEqual([undefined, undefined, undefined]);
    // Orientation 6 is a quarter turn (Exif 2.32, tag 274).
    expect([format, width, height]).toEqual(["jpeg", 40, 60]);
  });

  it("that can't be opened is refused", async () => {
    const broken = Buffer.concat([Buffer.from([0xff, 0xd8, 0xff, 0xe0]), randomBytes(400)]);
    expect(await upload("photograph", broken)).toMatchObject({ state: "refused", attachmentId: null });
  });
});
